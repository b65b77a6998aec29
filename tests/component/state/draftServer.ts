import type { AxleDocument } from '$lib/schemas/axle';

interface Held {
	version: number;
	document: AxleDocument;
	updatedAt: string;
	updatedBy: string;
	parent: string | null;
}

/**
 * What stands behind `fetch`: the draft's contract (ETag, If-Match, 409 with the current document) held in memory.
 * `mode` breaks the line on purpose: offline throws as a browser does, expired answers 401, fault 500,
 * lost takes the write and loses the answer.
 */
export class DraftServer {
	held: Held;
	mode: 'well' | 'offline' | 'expired' | 'fault' | 'refuse' | 'lost' = 'well';
	puts: { version: number; document: AxleDocument }[] = [];
	/** Holds answers back until `release` is called. */
	gate: Promise<void> | null = null;

	constructor(document: AxleDocument) {
		this.held = { version: 1, document, updatedAt: '2026-03-02T09:00:00.000Z', updatedBy: 'Ines Calder', parent: null };
	}

	/** Another person keeps a draft. */
	otherKeeps(document: AxleDocument, by = 'Tomas Reed'): void {
		const updatedAt = '2026-03-02T09:05:00.000Z';
		this.held = { ...this.held, version: this.held.version + 1, document, updatedAt, updatedBy: by };
	}

	hold(): () => void {
		let release = () => {};
		this.gate = new Promise<void>((resolve) => (release = resolve));
		return () => {
			this.gate = null;
			release();
		};
	}

	readonly fetch: typeof globalThis.fetch = async (input, init) => {
		if (this.mode === 'offline') throw new TypeError('Failed to fetch');
		const url = String(input);
		const body = typeof init?.body === 'string' ? (JSON.parse(init.body) as Record<string, unknown>) : {};
		const ifMatch = new Headers(init?.headers).get('if-match');
		await this.gate;
		if (this.mode === 'expired') return this.#problem(401, 'Sign in.');
		if (this.mode === 'fault') return this.#problem(500, 'Something went wrong.');
		if (this.mode === 'refuse') {
			return this.#problem(422, 'Not accepted.', {
				errors: [{ field: 'document.left', message: 'Track: 600 to 2600 mm.' }]
			});
		}
		if (!init?.method || init.method === 'GET') return Response.json(this.held);
		if (ifMatch === null) return this.#problem(428, 'If-Match is missing.');
		if (ifMatch !== `"${this.held.version}"`)
			return this.#problem(409, 'The draft has changed.', { current: this.held });
		return url.endsWith('/start') ? this.#start() : this.#put(body.document as AxleDocument);
	};

	#put(document: AxleDocument): Response {
		this.puts.push({ version: this.held.version, document });
		this.held = { ...this.held, version: this.held.version + 1, document, updatedBy: 'Ines Calder' };
		if (this.mode === 'lost') throw new TypeError('Failed to fetch');
		const { version, updatedAt, updatedBy } = this.held;
		return Response.json({ version, updatedAt, updatedBy });
	}

	/** The revision to start from, set by the test. */
	revision: AxleDocument | null = null;

	#start(): Response {
		if (!this.revision) return this.#problem(404, 'No such revision.');
		this.held = { ...this.held, version: this.held.version + 1, document: this.revision, parent: 'A' };
		return Response.json(this.held);
	}

	#problem(status: number, detail: string, extra: object = {}): Response {
		const body = { type: 'about:blank', title: detail, status, detail, ...extra };
		return new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/problem+json' } });
	}
}
