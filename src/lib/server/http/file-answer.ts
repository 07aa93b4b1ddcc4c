import type { DataFileView } from '$lib/server/services/data-files';

/** A file that was taken in, as both files calls answer it. */
export function fileAnswer({ sessionId, rows, ...file }: DataFileView) {
	if (rows === null) throw new Error(`Data file ${file.id} was taken in without a count of rows`);
	return { ...file, session: sessionId, rows };
}
