import { z } from 'zod';
import { DATA_FORMATS, DATA_KINDS } from '../enumerations';
import { idParams } from './fields';
import { operation } from './operation';

const TABLE_TYPES = {
	'text/csv': 'Table with a header; commas or semicolons, decimal points or commas.',
	'text/tab-separated-values': 'Table with a header, columns apart by tabs.',
	'application/octet-stream': 'NumPy `.npy`, or a table; Content-Disposition names the file.'
};

export type FileType = keyof typeof TABLE_TYPES;

const headers = z.object({
	'content-disposition': z.string().max(1000).optional().meta({
		description: 'Names the original: `attachment; filename="r031.npy"`.'
	})
});

const query = z.object({
	decimal: z.enum(['.', ',']).optional().meta({ description: 'When it cannot be told by itself.' }),
	pxPerCm: z.coerce.number().positive().max(100_000).optional().meta({
		description: 'Scale of positions in pixels; the arena’s when left out.'
	})
});

const answer = z
	.object({
		id: z.uuid(),
		session: z.uuid(),
		kind: z.enum(DATA_KINDS),
		name: z.string(),
		format: z.enum(DATA_FORMATS),
		bytes: z.int(),
		sha256: z.string().meta({ description: 'Digest of the original, which is always kept.' }),
		rows: z.int(),
		columns: z.array(z.string()).nullable(),
		warnings: z.array(z.string())
	})
	.meta({ id: 'DataFile' });

const common = {
	method: 'PUT',
	tag: 'Files',
	permission: 'sessions.write',
	headers,
	query,
	file: TABLE_TYPES,
	status: 200,
	answer
} as const;

const conflict = { 409: 'The session or sorting has such data already; see `code`' };

export const putSessionFile = operation({
	...common,
	id: 'putSessionFile',
	path: '/api/v1/sessions/{id}/files/{kind}',
	summary: 'Put positions, spikes or facts of units to a session',
	description:
		'The body is the file itself. It is taken in whole or refused with row, column and reason. Spikes put to a session make a sorting of that session alone. When positions and spikes are there, the standard analysis is asked for by itself.',
	params: idParams.extend({
		kind: z.enum(['position', 'spikes', 'units'], {
			error: 'This version takes position, spikes and units files.'
		})
	}),
	refusals: conflict
});

export const putSortingFile = operation({
	...common,
	id: 'putSortingFile',
	path: '/api/v1/sortings/{id}/files/spikes',
	summary: 'Put the spikes of a sorting that was announced',
	params: idParams,
	refusals: conflict
});
