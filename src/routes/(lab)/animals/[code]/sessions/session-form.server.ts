import { DateTime } from 'luxon';
import type { SessionForm } from '$lib/schemas/session-form';
import { Invalid } from '$lib/server/errors';
import type { SessionView } from '$lib/server/services/session-views';

/** Fields of an epoch in the service's input → the form's list that holds it. */
const LISTS = {
	name: 'epochName',
	kind: 'epochKind',
	startS: 'epochStartS',
	stopS: 'epochStopS',
	arena: 'epochArena',
	configuration: 'epochConfiguration'
} as const;

/** Rows of the epochs table that say something, by their number in the form. */
function filledRows(form: SessionForm): number[] {
	return form.epochName.flatMap((name, row) =>
		[name, form.epochStartS[row], form.epochStopS[row]].some((cell) => cell?.trim()) ? [row] : []
	);
}

const second = (text: string | undefined) =>
	text?.trim() ? Number(text.trim().replace(',', '.')) : NaN;

/** The form as the service takes it; moments are on the lab's clock. */
export function toInput(form: SessionForm, zone: string) {
	const moment = (local: string) => DateTime.fromISO(local, { zone }).toJSDate();
	const { reference, ground, filters, gain, headstageSerial } = form;
	const settings = { reference, ground, filters, gain, headstageSerial };
	return {
		startsAt: form.startsAt === '' ? undefined : moment(form.startsAt),
		clockZeroAt: form.clockZeroAt === '' ? null : moment(form.clockZeroAt),
		day: form.day || null,
		arena: form.arena || null,
		rig: form.rig || null,
		// What is left empty is copied from the rig.
		rigSettings: Object.fromEntries(Object.entries(settings).filter(([, text]) => text !== '')),
		note: form.note,
		epochs: filledRows(form).map((row) => ({
			name: form.epochName[row],
			kind: form.epochKind[row] ?? 'run',
			startS: second(form.epochStartS[row]),
			stopS: second(form.epochStopS[row]),
			arena: form.epochArena[row] || null,
			configuration: form.epochConfiguration[row] ?? ''
		})),
		revision: form.revision
	};
}

/** Puts what the service says of `epochs[2].startS` beside the form's third start. */
export async function besideRows<T>(form: SessionForm, work: () => Promise<T>): Promise<T> {
	try {
		return await work();
	} catch (fault) {
		if (!(fault instanceof Invalid)) throw fault;
		const rows = filledRows(form);
		throw new Invalid(
			fault.issues.map(({ field, message }) => {
				const [, at, name] = /^epochs\[(\d+)\]\.(\w+)$/.exec(field) ?? [];
				const list = Object.entries(LISTS).find(([key]) => key === name)?.[1];
				return { field: list ? `${list}[${rows[Number(at)]}]` : field, message };
			}),
			fault.message,
			fault.code
		);
	}
}

export function toForm(view: SessionView, zone: string): SessionForm {
	const local = (iso: string) => DateTime.fromISO(iso, { zone }).toFormat("yyyy-MM-dd'T'HH:mm:ss");
	const { epochs } = view;
	return {
		startsAt: local(view.startsAt),
		clockZeroAt: local(view.clockZeroAt),
		day: view.day,
		arena: view.arenaId ?? '',
		rig: view.rigId ?? '',
		...view.rigSettings,
		note: view.note,
		epochName: epochs.map(({ name }) => name),
		epochKind: epochs.map(({ kind }) => kind),
		epochStartS: epochs.map(({ startS }) => String(startS)),
		epochStopS: epochs.map(({ stopS }) => String(stopS)),
		epochArena: epochs.map(({ arenaId }) => arenaId ?? ''),
		epochConfiguration: epochs.map(({ configuration }) => configuration),
		revision: view.revision
	};
}
