import pino from 'pino';

/** Error fields that may go to the log: kind, code, message without addresses, and where in the code; never a statement or its values. */
function describeError(error: unknown): Record<string, unknown> {
	if (!(error instanceof Error)) return { type: typeof error };
	const code =
		(error as { code?: unknown; parent?: { code?: unknown } }).parent?.code ?? (error as { code?: unknown }).code;
	// A database error's message quotes values; its code and place are enough.
	const quotesValues = /^(Sequelize|SqlError)/.test(error.name) || error.constructor.name === 'SqlError';
	return {
		type: error.name,
		...(code === undefined ? {} : { code }),
		...(quotesValues ? {} : { message: withoutAddresses(error.message) }),
		stack: (error.stack ?? '')
			.split('\n')
			.filter((line) => /^\s+at /.test(line))
			.slice(0, 20)
	};
}

function withoutAddresses(text: string): string {
	return text.replace(/[^\s@<>"']+@[^\s@<>"']+/g, '[address]').slice(0, 500);
}

/** A log of JSON lines, to stdout unless told otherwise. */
export function createLog(destination?: pino.DestinationStream): pino.Logger {
	const options: pino.LoggerOptions = {
		level: process.env.LOG_LEVEL || 'info',
		base: undefined,
		timestamp: pino.stdTimeFunctions.isoTime,
		serializers: { err: describeError },
		// Left to itself pino repeats an error's message, values and all, as the line's own.
		hooks: {
			logMethod([first, ...rest], method) {
				const error: unknown = first instanceof Error ? first : (first as { err?: unknown } | null)?.err;
				const fields = first instanceof Error ? { err: first } : first;
				method.apply(this, error && rest.length === 0 ? [fields, 'error'] : [fields, ...rest]);
			}
		}
	};
	return destination ? pino(options, destination) : pino(options);
}

/** The application's log. Callers pass ids and counts; no addresses, tokens or bodies. */
export const log = createLog();
