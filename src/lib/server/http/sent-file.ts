import { Readable } from 'node:stream';
import type { FileType } from '$lib/schemas/api/files';
import { refuseLength } from '$lib/server/storage/limit';
import { CutOff, UnsupportedType } from './protocol-refusals';

const ENDINGS: Record<FileType, string> = {
	'text/csv': '.csv',
	'text/tab-separated-values': '.tsv',
	'application/octet-stream': ''
};

const isFileType = (type: string): type is FileType => Object.hasOwn(ENDINGS, type);

/**
 * A call's body as a file under its own name; it streams, so its size costs no memory.
 * @throws UnsupportedType, TooLarge when its announced length is over the limit, CutOff
 */
export async function sentFile<T>(
	request: Request,
	kind: string,
	work: (file: { name: string; content: Readable }) => Promise<T>
): Promise<T> {
	const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase() ?? '';
	if (!isFileType(type)) {
		throw new UnsupportedType(
			`Send the file as the body, with Content-Type: ${Object.keys(ENDINGS).join(', ')}.`
		);
	}
	refuseLength(Number(request.headers.get('content-length')));
	const content = Readable.from(request.body ?? []);
	let isCutOff = false;
	content.on('error', () => {
		isCutOff = true;
	});
	const disposition = request.headers.get('content-disposition');
	try {
		return await work({ name: fileName(disposition) ?? `${kind}${ENDINGS[type]}`, content });
	} catch (fault) {
		throw isCutOff ? new CutOff() : fault;
	}
}

/** RFC 6266: `filename*` in UTF-8 goes before `filename`; folders in either are dropped. */
export function fileName(disposition: string | null): string | null {
	if (disposition === null) return null;
	const encoded = /;\s*filename\*\s*=\s*utf-8'[^']*'([^;\s]+)/i.exec(disposition)?.[1];
	const plain = /;\s*filename\s*=\s*(?:"((?:[^"\\]|\\.)*)"|([^;\s]+))/i.exec(disposition);
	const quoted = plain?.[1]?.replaceAll(/\\(.)/g, '$1') ?? plain?.[2];
	const name = (encoded === undefined ? quoted : decoded(encoded)) ?? '';
	return name.split(/[\\/]/).at(-1)?.trim() || null;
}

function decoded(text: string): string | undefined {
	try {
		return decodeURIComponent(text);
	} catch (fault) {
		if (fault instanceof URIError) return undefined;
		throw fault;
	}
}
