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

/** The application's log: JSON lines on stdout. Callers pass ids and counts; no addresses, tokens or bodies. */
export const log = pino({
	level: process.env.LOG_LEVEL || 'info',
	base: undefined,
	timestamp: pino.stdTimeFunctions.isoTime,
	serializers: { err: describeError }
});
