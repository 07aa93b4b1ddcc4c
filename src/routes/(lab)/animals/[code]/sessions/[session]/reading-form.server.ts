import type { TakeIn } from '$lib/schemas/data-file';
import type { DataFileView } from '$lib/server/services/data-files';

const text = (sent: FormData, name: string) => {
	const value = sent.get(name);
	return typeof value === 'string' ? value.trim() : '';
};

/** What a person confirmed about a file: `column-2` names the field of the third column. */
export function choiceOf({ kind, reading }: DataFileView, sent: FormData): Partial<TakeIn> {
	const { recognised } = reading;
	const decimal = text(sent, 'decimal');
	const scale = text(sent, 'pxPerCm').replace(',', '.');
	const labelsFileId = text(sent, 'labelsFileId');
	return {
		...(recognised && {
			mapping: Object.fromEntries(
				recognised.header.map((column, i) => [column, text(sent, `column-${i}`)])
			)
		}),
		...((decimal === '.' || decimal === ',') && { decimal }),
		...(scale && { pxPerCm: Number(scale) }),
		...(labelsFileId && { labelsFileId }),
		...(kind === 'spikes' && {
			sorting: {
				program: text(sent, 'program'),
				programVersion: text(sent, 'programVersion'),
				supersedes: text(sent, 'supersedes') || null
			}
		})
	};
}
