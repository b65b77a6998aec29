import type { RequestEvent } from '@sveltejs/kit';
import type { Role } from '../schemas/auth';

/** Who asks, in which shop and role: the first argument of every query. */
export interface Actor {
	personId: string;
	personName: string;
	shopId: string;
	shopSlug: string;
	role: Role;
	/** False for those who see only builds they are assigned to. */
	seesAllBuilds: boolean;
	requestId: string;
}

/** A request of any route; guards and helpers read only what every event has. */
export interface AnyEvent extends Pick<RequestEvent, 'locals' | 'url' | 'request' | 'cookies' | 'getClientAddress'> {
	params: Partial<Record<string, string>>;
	route: { id: string | null };
}
