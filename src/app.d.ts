import type { SignedInPerson } from '$lib/schemas/auth';
import type { Problem } from '$lib/schemas/problem';

declare global {
	namespace App {
		interface Locals {
			/** Who is signed in, or null. */
			person: SignedInPerson | null;
			session: { id: string; expiresAt: Date } | null;
			/** The id that stands in the log and on an error page. */
			requestId: string;
		}
		interface Error {
			message: string;
			/** The id under which the log holds the details. */
			id?: string;
			/** What an endpoint answers as problem+json; pages use `message` alone. */
			problem?: Omit<Problem, 'type' | 'status' | 'title'>;
		}
	}
}

export {};
