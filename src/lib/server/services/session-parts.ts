import { Op, col, fn, where as whereFn, type Transaction } from 'sequelize';
import type { EpochInput, RigSettings, SessionInput } from '$lib/schemas/session';
import { Invalid } from '$lib/server/errors';
import { Arena } from '$lib/server/models/arena';
import { Rig } from '$lib/server/models/rig';

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

/** A register's row by id, or by name in whatever letter case. */
function named(ref: string) {
	const isNamed = whereFn(fn('lower', col('name')), ref.trim().toLowerCase());
	return { withdrawnAt: null, [Op.and]: UUID.test(ref) ? { id: ref } : isNamed };
}

/** Arenas also go by their description, which scripts know without asking. */
async function arenaId(ref: string, field: string, transaction: Transaction): Promise<string> {
	const arena =
		(await Arena.findOne({ where: named(ref), attributes: ['id'], transaction })) ??
		(await Arena.findOne({
			where: { withdrawnAt: null, description: ref.trim() },
			attributes: ['id'],
			order: ['createdAt'],
			transaction
		}));
	if (arena) return arena.id;
	throw new Invalid([
		{ field, message: `There is no arena "${ref}". A PI can add it on the Lab page.` }
	]);
}

/** The columns that an input's references and rig settings become. */
export async function settled(
	input: SessionInput,
	transaction: Transaction
): Promise<{ arenaId: string | null; rigId: string | null } & RigSettings> {
	const rig = input.rig ? await Rig.findOne({ where: named(input.rig), transaction }) : null;
	if (input.rig && !rig) {
		const message = `There is no rig "${input.rig}". A PI can add it on the Lab page.`;
		throw new Invalid([{ field: 'rig', message }]);
	}
	const given = input.rigSettings;
	return {
		arenaId: input.arena ? await arenaId(input.arena, 'arena', transaction) : null,
		rigId: rig?.id ?? null,
		reference: given.reference ?? rig?.reference ?? '',
		ground: given.ground ?? rig?.ground ?? '',
		filters: given.filters ?? rig?.filters ?? '',
		gain: given.gain ?? rig?.gain ?? '',
		headstageSerial: given.headstageSerial ?? rig?.headstageSerial ?? ''
	};
}

export interface EpochColumns {
	name: string;
	kind: EpochInput['kind'];
	startS: number;
	stopS: number;
	arenaId: string | null;
	configuration: string;
}

/**
 * Epochs in order of time, arenas resolved.
 * @throws Invalid naming the row that overlaps, repeats a name or lacks its arena
 */
export async function settledEpochs(
	epochs: readonly EpochInput[],
	usualArenaId: string | null,
	transaction: Transaction
): Promise<EpochColumns[]> {
	refuseClashes(epochs);
	const settledRows: EpochColumns[] = [];
	for (const [k, { arena, ...epoch }] of epochs.entries()) {
		const own = arena ? await arenaId(arena, `epochs[${k}].arena`, transaction) : null;
		const id = own ?? (epoch.kind === 'run' ? usualArenaId : null);
		if (epoch.kind === 'run' && id === null) {
			const message = 'A run epoch needs its arena.';
			throw new Invalid([{ field: `epochs[${k}].arena`, message }]);
		}
		settledRows.push({ ...epoch, arenaId: id });
	}
	return settledRows.sort((a, b) => a.startS - b.startS);
}

function refuseClashes(epochs: readonly EpochInput[]): void {
	const seen = new Set<string>();
	for (const [k, { name, startS, stopS }] of epochs.entries()) {
		if (seen.has(name.toLowerCase())) {
			const message = `Two epochs are named "${name}".`;
			throw new Invalid([{ field: `epochs[${k}].name`, message }]);
		}
		seen.add(name.toLowerCase());
		const other = epochs.find((o, j) => j < k && o.startS < stopS && startS < o.stopS);
		if (other) {
			const message = `"${name}" overlaps "${other.name}" in time.`;
			throw new Invalid([{ field: `epochs[${k}].startS`, message }]);
		}
	}
}
