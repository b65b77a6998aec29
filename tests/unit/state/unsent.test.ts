import { clearAllUnsent, countUnsent, createUnsentStore, type UnsentDraft } from '$lib/client/unsent';
import { emptyAxle } from '$lib/domain/axle';
import 'fake-indexeddb/auto';
import { IDBFactory } from 'fake-indexeddb';
import { beforeEach, expect, test, vi } from 'vitest';

beforeEach(() => {
	globalThis.indexedDB = new IDBFactory();
});

function waiting(person: string, build: string): UnsentDraft {
	const document = emptyAxle();
	document.left.wheel.track = 1480;
	return { person, build, base: { version: 3, document: emptyAxle() }, document, writtenAt: 0 };
}

test('what is written is read back, by person and build', async () => {
	const store = createUnsentStore();
	expect(await store.write(waiting('ines', 'one'))).toBe(true);
	expect(await store.read('ines', 'one')).toEqual(waiting('ines', 'one'));
	expect(await store.read('ines', 'two')).toBeNull();
	expect(await store.read('tomas', 'one')).toBeNull();
	expect(await countUnsent('ines')).toBe(1);
	await store.clear('ines', 'one');
	expect(await store.read('ines', 'one')).toBeNull();
});

test('sign-out leaves nothing of anybody', async () => {
	const store = createUnsentStore();
	await store.write(waiting('ines', 'one'));
	await store.write(waiting('tomas', 'two'));
	await clearAllUnsent();
	expect(await countUnsent('ines')).toBe(0);
	expect(await countUnsent('tomas')).toBe(0);
});

test('a browser that keeps nothing stops nobody, and it is said', async () => {
	const warned = vi.spyOn(console, 'warn').mockImplementation(() => {});
	globalThis.indexedDB = {
		open() {
			throw new DOMException('Storage is off.', 'SecurityError');
		}
	} as unknown as IDBFactory;
	const store = createUnsentStore();
	expect(await store.write(waiting('ines', 'one'))).toBe(false);
	expect(await store.read('ines', 'one')).toBeNull();
	expect(warned).toHaveBeenCalled();
	warned.mockRestore();
});
