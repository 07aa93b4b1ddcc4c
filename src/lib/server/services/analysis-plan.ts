import type { Ends } from '$lib/analysis/arena/along-straight';
import {
	ParameterError,
	sessionParameters,
	type SessionParameters
} from '$lib/analysis/session/parameters';
import type { AnalysisChoices } from '$lib/schemas/analysis-parameters';
import type { AnalysisSetup } from '$lib/schemas/data-state';
import type { Transaction } from 'sequelize';
import { Conflict, Invalid } from '$lib/server/errors';
import { Arena } from '$lib/server/models/arena';
import { Epoch } from '$lib/server/models/epoch';
import type { Session } from '$lib/server/models/session';

export interface Plan {
	parameters: SessionParameters;
	setup: AnalysisSetup;
}

/**
 * What an analysis of the session computes: the chosen arena, or the one run in longest, with its
 * bins unless others are asked for, and the epochs run there.
 * @throws Conflict when the session names no arena; Invalid for a choice that cannot be used
 */
export async function plan(
	session: Session,
	{ arena: chosen, ...choices }: AnalysisChoices,
	transaction: Transaction
): Promise<Plan> {
	const epochs = await Epoch.findAll({
		where: { sessionId: session.id, withdrawnAt: null },
		order: ['startS'],
		transaction
	});
	const runS = new Map<string, number>();
	for (const { kind, arenaId, startS, stopS } of epochs) {
		if (kind !== 'run' || !arenaId) continue;
		runS.set(arenaId, (runS.get(arenaId) ?? 0) + Number(stopS) - Number(startS));
	}
	if (runS.size === 0 && session.arenaId) runS.set(session.arenaId, 0);
	const ids = [...runS.keys()];
	const arenas = await Arena.findAll({ where: { id: ids }, transaction });
	const arena = chosen
		? arenas.find(({ id, name, description }) =>
				[id, name.toLowerCase(), description].includes(chosen.trim().toLowerCase())
			)
		: arenas.toSorted((a, b) => (runS.get(b.id) ?? 0) - (runS.get(a.id) ?? 0)).at(0);
	if (!arena) throw noArena(chosen, arenas);
	return {
		parameters: checked({ binCm: Number(arena.binCm), ...choices, arena: arena.description }),
		setup: {
			arenaId: arena.id,
			arenaName: arena.name,
			epochs: epochs.map(({ name, kind, startS, stopS, arenaId }) => ({
				name,
				kind: kind === 'run' && arenaId !== arena.id ? 'rest' : kind,
				startS: Number(startS),
				stopS: Number(stopS)
			})),
			...endsOf(arena)
		}
	};
}

function noArena(chosen: string | undefined, arenas: Arena[]): Conflict | Invalid {
	if (!chosen || arenas.length === 0) {
		return new Conflict(
			'no-arena',
			'The session does not say where the animal ran. Edit it and give its arena, or the arena of its run epochs; then ask again.'
		);
	}
	const names = arenas.map(({ name }) => name).join(', ');
	const message = `"${chosen}" is no arena of this session. It ran in: ${names}.`;
	return new Invalid([{ field: 'arena', message }]);
}

function checked(given: Parameters<typeof sessionParameters>[0]): SessionParameters {
	try {
		return sessionParameters(given);
	} catch (fault) {
		if (!(fault instanceof ParameterError)) throw fault;
		throw new Invalid([{ field: fault.field, message: fault.reason }]);
	}
}

/** Ends are entered as the camera sees them: in pixels where the arena has a scale, else in cm. */
function endsOf(arena: Arena): { ends?: Ends } {
	const figures = [arena.endAX, arena.endAY, arena.endBX, arena.endBY];
	if (figures.some((figure) => figure === null)) return {};
	const [ax, ay, bx, by] = figures.map((figure) => Number(figure) / Number(arena.pxPerCm ?? 1));
	return { ends: { a: { xCm: ax, yCm: ay }, b: { xCm: bx, yCm: by } } };
}
