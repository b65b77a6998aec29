import * as buildApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/+server';
import * as draftApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/draft/+server';
import * as startApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/draft/start/+server';
import * as revisionsApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/revisions/+server';
import * as revisionApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/revisions/[letter=letter]/+server';
import * as recordsApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/revisions/[letter=letter]/records/+server';
import * as releaseApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/[build=uuid]/revisions/[letter=letter]/release/+server';
import * as buildsApi from '../../src/routes/api/v1/shops/[shop=slug]/builds/+server';
import * as shimsApi from '../../src/routes/api/v1/shops/[shop=slug]/shims/+server';
import type { Visitor } from './server';
import { SHOP } from './people';

type Headers = Record<string, string>;
const match = (version: number): Headers => ({ 'if-match': `"${version}"` });

/** The API of one build as a visitor calls it; `shop` and `build` stand in the address. */
export function api(visitor: Visitor, build = '', shop = SHOP) {
	const params = { shop, build };
	const base = `/api/v1/shops/${shop}/builds`;
	const at = (letter: string) => ({ params: { ...params, letter } });
	return {
		list: (search = '') => visitor.call(buildsApi.GET, `${base}${search}`, { params }),
		create: (body: unknown, headers: Headers = {}) =>
			visitor.call(buildsApi.POST, base, { method: 'POST', params, body, headers }),
		read: () => visitor.call(buildApi.GET, base, { params }),
		change: (body: unknown) => visitor.call(buildApi.PATCH, base, { method: 'PATCH', params, body }),
		draft: () => visitor.call(draftApi.GET, base, { params }),
		put: (document: unknown, version: number | null) =>
			visitor.call(draftApi.PUT, base, {
				method: 'PUT',
				params,
				body: { document },
				headers: version === null ? {} : match(version)
			}),
		start: (letter: string, version: number) =>
			visitor.call(startApi.POST, base, { method: 'POST', params, body: { letter }, headers: match(version) }),
		revisions: () => visitor.call(revisionsApi.GET, base, { params }),
		keep: (body: unknown) => visitor.call(revisionsApi.POST, base, { method: 'POST', params, body }),
		revision: (letter: string) => visitor.call(revisionApi.GET, base, at(letter)),
		release: (letter: string) => visitor.call(releaseApi.POST, base, { ...at(letter), method: 'POST', body: {} }),
		records: (letter: string) => visitor.call(recordsApi.GET, base, at(letter)),
		addRecord: (letter: string, body: unknown) =>
			visitor.call(recordsApi.POST, base, { ...at(letter), method: 'POST', body }),
		shims: () => visitor.call(shimsApi.GET, base, { params }),
		putShims: (body: unknown) => visitor.call(shimsApi.PUT, base, { method: 'PUT', params, body })
	};
}
