import greek400 from '@fontsource/jetbrains-mono/files/jetbrains-mono-greek-400-normal.woff2?url';
import latin400 from '@fontsource/jetbrains-mono/files/jetbrains-mono-latin-400-normal.woff2?url';
import latin500 from '@fontsource/jetbrains-mono/files/jetbrains-mono-latin-500-normal.woff2?url';

const FACES = [
	{ url: latin400, weight: 400, range: 'U+0000-00FF,U+2000-206F,U+2212' },
	{ url: latin500, weight: 500, range: 'U+0000-00FF,U+2000-206F,U+2212' },
	{ url: greek400, weight: 400, range: 'U+0370-03FF' }
];

async function asData(url: string): Promise<string> {
	const bytes = new Uint8Array(await (await fetch(url)).arrayBuffer());
	let text = '';
	for (let k = 0; k < bytes.length; k += 8192) text += String.fromCharCode(...bytes.subarray(k, k + 8192));
	return `data:font/woff2;base64,${btoa(text)}`;
}

let faces: Promise<string> | null = null;

/** Font faces that carry their fonts: a drawing that is turned into a picture is shut off from the page's. */
export function carriedFonts(): Promise<string> {
	faces ??= Promise.all(
		FACES.map(
			async ({ url, weight, range }) =>
				`@font-face{font-family:'JetBrains Mono';font-weight:${weight};src:url(${await asData(url)}) format('woff2');unicode-range:${range}}`
		)
	).then((all) => all.join(''));
	// A lost connection is not kept: the next try fetches again.
	faces.catch(() => (faces = null));
	return faces;
}

/** A drawing that stands by itself as a PNG, `times` pixels for one of the sheet. */
export async function pngOf(svg: string, width: number, height: number, times = 2): Promise<Blob> {
	const url = URL.createObjectURL(new Blob([svg], { type: 'image/svg+xml;charset=utf-8' }));
	try {
		const image = new Image(width * times, height * times);
		image.src = url;
		await image.decode();
		const canvas = document.createElement('canvas');
		[canvas.width, canvas.height] = [Math.round(width * times), Math.round(height * times)];
		const pen = canvas.getContext('2d');
		if (!pen) throw new Error('This browser gives no canvas to draw on.');
		pen.drawImage(image, 0, 0, canvas.width, canvas.height);
		const blob = await new Promise<Blob | null>((done) => canvas.toBlob(done, 'image/png'));
		if (!blob) throw new Error('This browser made no picture of the sheet.');
		return blob;
	} finally {
		URL.revokeObjectURL(url);
	}
}

/** Hands a file to the person. */
export function download(name: string, content: Blob | string, type = 'text/plain'): void {
	const url = URL.createObjectURL(typeof content === 'string' ? new Blob([content], { type }) : content);
	const link = Object.assign(document.createElement('a'), { href: url, download: name });
	document.body.append(link);
	link.click();
	link.remove();
	// The browser reads the address after this turn.
	setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
