import { daysBetween, dayAfter } from '$lib/format/day-count';
import type { AnalysisState, DataState, Restriction } from '$lib/schemas/enumerations';
import { demand, may, type Actor } from '$lib/server/access';
import { select } from '$lib/server/select';
import * as invitations from './invitations';
import { labClock, type LabClock } from './lab-clock';
import { setupSteps, type SetupStep } from './setup-steps';

export interface AnimalToWeigh {
	code: string;
	protocol: string;
	restriction: Restriction;
	/** Lab day of the last weight, and how many days ago that was. */
	lastDay: string | null;
	daysAgo: number | null;
}

export interface SessionOfToday {
	id: string;
	code: string;
	startsAt: Date;
	/** Newest state of what an analysis needs. */
	files: { position?: DataState; spikes?: DataState };
	/** The one in force, else the newest. */
	analysis: { state: AnalysisState; progress: number; failure: string | null } | null;
}

/** What the reader has to do; a part the reader's roles do not do is null. */
export interface TodayView {
	day: string;
	setup: SetupStep[];
	toWeigh: AnimalToWeigh[] | null;
	sessionsToday: SessionOfToday[] | null;
	/** Of the two weeks before today: without data, without an analysis, at work or failed. */
	unfinished: SessionOfToday[] | null;
	invitations: { id: string; name: string; expiresAt: Date }[] | null;
}

export async function view(by: Actor | null): Promise<TodayView> {
	demand(by, 'own.read');
	const clock = await labClock();
	const [setup, toWeigh, sessions, open] = await Promise.all([
		setupSteps(by),
		may(by, 'weights.write') ? animalsToWeigh(clock) : null,
		may(by, 'data.read') ? recentSessions(clock.today) : null,
		may(by, 'members.write') ? invitations.list(by) : null
	]);
	return {
		day: clock.today,
		setup,
		toWeigh,
		sessionsToday: sessions?.filter((row) => row.day === clock.today) ?? null,
		unfinished:
			sessions?.filter((row) => row.day !== clock.today && row.analysis?.state !== 'done') ?? null,
		invitations: open?.map(({ id, name, expiresAt }) => ({ id, name, expiresAt })) ?? null
	};
}

/** Animals under a restriction that nobody has weighed since the lab day began. */
async function animalsToWeigh({ today, dayOf }: LabClock): Promise<AnimalToWeigh[]> {
	const rows = await select<{
		code: string;
		protocol: string;
		restriction: Restriction;
		lastAt: Date | null;
	}>(
		`SELECT a.code, p.number AS protocol, p.restriction, w.last_at AS "lastAt"
		FROM animal a
		JOIN animal_protocol m ON m.animal_id = a.id
			AND m.from_day <= $today::date AND (m.until_day IS NULL OR m.until_day > $today::date)
		JOIN protocol p ON p.id = m.protocol_id AND p.restriction <> 'none'
		LEFT JOIN (SELECT animal_id, max(measured_at) AS last_at FROM weight
			WHERE withdrawn_at IS NULL GROUP BY animal_id) w ON w.animal_id = a.id
		WHERE a.withdrawn_at IS NULL AND a.status = 'in-lab' ORDER BY a.code`,
		{ today }
	);
	return rows
		.map(({ lastAt, ...row }) => {
			const lastDay = lastAt === null ? null : dayOf(lastAt);
			const daysAgo = lastDay === null ? null : daysBetween(lastDay, today);
			return { ...row, lastDay, daysAgo };
		})
		.filter((row) => row.lastDay !== today);
}

function recentSessions(today: string): Promise<(SessionOfToday & { day: string })[]> {
	return select(
		`SELECT s.id, a.code, d.date::text AS day, s.starts_at AS "startsAt",
			(SELECT coalesce(json_object_agg(kind, state), '{}') FROM (
				SELECT DISTINCT ON (kind) kind, state FROM data_file
				WHERE session_id = s.id AND withdrawn_at IS NULL ORDER BY kind, uploaded_at DESC
			) f) AS files,
			CASE WHEN n.state IS NULL THEN NULL ELSE json_build_object(
				'state', n.state, 'progress', n.progress, 'failure', n.failure ->> 'message'
			) END AS analysis
		FROM session s
		JOIN animal a ON a.id = s.animal_id AND a.withdrawn_at IS NULL
		JOIN day d ON d.id = s.day_id
		LEFT JOIN LATERAL (SELECT state, progress, failure FROM analysis
			WHERE session_id = s.id ORDER BY id = s.current_analysis_id DESC NULLS LAST, asked_at DESC
			LIMIT 1) n ON true
		WHERE s.withdrawn_at IS NULL AND d.date > $since::date
		ORDER BY s.starts_at DESC`,
		{ since: dayAfter(today, -14) }
	);
}
