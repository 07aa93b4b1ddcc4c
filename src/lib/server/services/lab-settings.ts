import { demand, type Actor } from '$lib/server/access';
import { Conflict } from '$lib/server/errors';
import { LabSetting } from '$lib/server/models/lab-setting';
import { record, type Write } from '$lib/server/record';
import { settings } from '$lib/server/settings';
import { LAB_SETTINGS, type LabSettingKey, type LabSettingValue } from '$lib/schemas/lab-settings';

/** What stands until somebody sets it. */
function standard(): { [K in LabSettingKey]: LabSettingValue<K> } {
	const zone = settings().labTimeZone ?? Intl.DateTimeFormat().resolvedOptions().timeZone;
	return { lab: { name: 'Our lab', timeZone: zone, dayStartsAt: '04:00', isDemo: false } };
}

export interface SettingVersion<K extends LabSettingKey> {
	value: LabSettingValue<K>;
	/** 0 while nobody has set it. */
	version: number;
	setAt: Date | null;
}

/** The value in force. Asked without a reader: also signed-out pages show the lab's name. */
export async function get<K extends LabSettingKey>(key: K): Promise<LabSettingValue<K>> {
	return (await current(key)).value;
}

export async function current<K extends LabSettingKey>(key: K): Promise<SettingVersion<K>> {
	const row = await LabSetting.latest(key);
	if (!row) return { value: standard()[key], version: 0, setAt: null };
	const value = LAB_SETTINGS[key].parse(row.value) as LabSettingValue<K>;
	return { value, version: row.version, setAt: row.setAt };
}

/** Adds a version as part of a write. */
export async function put<K extends LabSettingKey>(
	w: Write,
	by: Actor,
	key: K,
	value: LabSettingValue<K>
): Promise<void> {
	const before = await LabSetting.latest(key, w.t);
	const version = (before?.version ?? 0) + 1;
	const row = await LabSetting.create(
		{ key, version, value: LAB_SETTINGS[key].parse(value), setBy: by.personId },
		{ transaction: w.t }
	);
	await w.log('lab-setting.set', { kind: 'lab-setting', id: row.id }, { key, version, value });
}

/**
 * Stores the zone at the first start, so that days never move when the machine's zone does.
 * Safe to call at every start.
 */
export async function prepare(by: Actor): Promise<void> {
	demand(by, 'lab-settings.write');
	if (await LabSetting.latest('lab')) return;
	await record(by, (w) => put(w, by, 'lab', standard().lab));
}

/** Name and start of the day. The zone stays: stored days were counted in it. */
export async function edit(
	by: Actor | null,
	change: { name: string; dayStartsAt: string; version: number }
): Promise<void> {
	demand(by, 'lab-settings.write');
	await record(by, async (w) => {
		const { value, version } = await current('lab');
		if (version !== change.version) throw staleSettings();
		await put(w, by, 'lab', { ...value, name: change.name, dayStartsAt: change.dayStartsAt });
	});
}

function staleSettings(): Conflict {
	return new Conflict(
		'stale',
		'Somebody changed these settings meanwhile. Nothing was overwritten: open the page again, look at what they set, and enter your change once more.'
	);
}
