import type {
	AnalysisState,
	DataKind,
	DataState,
	DayState,
	EpochKind
} from '$lib/schemas/enumerations';
import type { AnalysisFailure } from '$lib/schemas/data-state';
import type { RigSettings } from '$lib/schemas/session';
import type { Analysis } from '$lib/server/models/analysis';
import type { Animal } from '$lib/server/models/animal';
import type { Arena } from '$lib/server/models/arena';
import type { DataFile } from '$lib/server/models/data-file';
import type { Day } from '$lib/server/models/day';
import type { Epoch } from '$lib/server/models/epoch';
import type { Rig } from '$lib/server/models/rig';
import type { Session } from '$lib/server/models/session';

export interface EpochView {
	name: string;
	kind: EpochKind;
	startS: number;
	stopS: number;
	arenaId: string | null;
	arenaName: string | null;
	configuration: string;
}

/** An analysis without its result: what lists and headlines show. */
export interface AnalysisSummary {
	id: string;
	state: AnalysisState;
	progress: number;
	askedAt: string;
	finishedAt: string | null;
	failure: AnalysisFailure | null;
	sortingId: string;
	unitsUsed: number | null;
	windows: number | null;
	medianErrorCm: number | null;
	medianErrorCi95Cm: [number, number] | null;
	chanceMedianErrorCm: number | null;
}

export interface SessionRow {
	id: string;
	animal: string;
	isSimulated: boolean;
	day: string;
	dayState: DayState;
	startsAt: string;
	epochs: EpochView[];
	/** State of the newest file of each kind that is in force. */
	files: Partial<Record<DataKind, DataState>>;
	/** The one in force, else the newest. */
	analysis: AnalysisSummary | null;
	withdrawn: { at: string; why: string } | null;
}

export interface SessionView extends SessionRow {
	clockZeroAt: string;
	arenaId: string | null;
	arenaName: string | null;
	rigId: string | null;
	rigName: string | null;
	rigSettings: RigSettings;
	note: string;
	createdBy: string;
	currentAnalysisId: string | null;
	revision: number;
}

/** A session with the rows that its view is made of. */
export type LoadedSession = Session & {
	animal: Animal;
	day: Day;
	epochs: (Epoch & { arena: Arena | null })[];
	files: DataFile[];
	analyses: Analysis[];
	arena: Arena | null;
	rig: Rig | null;
	creator: { name: string };
};

export const SUMMARY_COLUMNS = [
	'id',
	'sessionId',
	'sortingId',
	'state',
	'progress',
	'askedAt',
	'finishedAt',
	'failure',
	'unitsUsed',
	'windows',
	'medianErrorCm',
	'medianErrorLowCm',
	'medianErrorHighCm',
	'chanceMedianErrorCm'
] as const;

export function toSummary(row: Analysis): AnalysisSummary {
	const { medianErrorLowCm: low, medianErrorHighCm: high } = row;
	return {
		id: row.id,
		state: row.state,
		progress: row.progress,
		askedAt: row.askedAt.toISOString(),
		finishedAt: row.finishedAt?.toISOString() ?? null,
		failure: row.failure ?? null,
		sortingId: row.sortingId,
		unitsUsed: row.unitsUsed ?? null,
		windows: row.windows ?? null,
		medianErrorCm: row.medianErrorCm ?? null,
		medianErrorCi95Cm: low === null || high === null ? null : [low, high],
		chanceMedianErrorCm: row.chanceMedianErrorCm ?? null
	};
}

export function toRow(session: LoadedSession): SessionRow {
	const { animal, day, epochs, files, analyses, withdrawnAt, withdrawnWhy } = session;
	const inForce = files.filter((file) => file.withdrawnAt === null);
	const newest = analyses.toSorted((a, b) => b.askedAt.getTime() - a.askedAt.getTime());
	const shown = newest.find(({ id }) => id === session.currentAnalysisId) ?? newest.at(0);
	return {
		id: session.id,
		animal: animal.code,
		isSimulated: animal.isSimulated,
		day: day.date,
		dayState: day.state,
		startsAt: session.startsAt.toISOString(),
		epochs: epochs
			.map((epoch) => ({
				name: epoch.name,
				kind: epoch.kind,
				startS: Number(epoch.startS),
				stopS: Number(epoch.stopS),
				arenaId: epoch.arenaId,
				arenaName: epoch.arena?.name ?? null,
				configuration: epoch.configuration
			}))
			.sort((a, b) => a.startS - b.startS),
		files: Object.fromEntries(
			inForce
				.toSorted((a, b) => a.uploadedAt.getTime() - b.uploadedAt.getTime())
				.map(({ kind, state }) => [kind, state])
		),
		analysis: shown ? toSummary(shown) : null,
		withdrawn:
			withdrawnAt && withdrawnWhy ? { at: withdrawnAt.toISOString(), why: withdrawnWhy } : null
	};
}

export function toView(session: LoadedSession): SessionView {
	const { reference, ground, filters, gain, headstageSerial } = session;
	return {
		...toRow(session),
		clockZeroAt: session.clockZeroAt.toISOString(),
		arenaId: session.arenaId,
		arenaName: session.arena?.name ?? null,
		rigId: session.rigId,
		rigName: session.rig?.name ?? null,
		rigSettings: { reference, ground, filters, gain, headstageSerial },
		note: session.note,
		createdBy: session.creator.name,
		currentAnalysisId: session.currentAnalysisId,
		revision: session.revision
	};
}
