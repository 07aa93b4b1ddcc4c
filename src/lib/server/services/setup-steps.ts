import { may, type Actor, type Permission } from '$lib/server/access';
import { select } from '$lib/server/select';

/** What a lab needs once before its first session, in the order in which one thing needs another. */
export const SETUP_STEPS = [
	'project',
	'protocol',
	'arena',
	'drive-design',
	'animal',
	'implant',
	'session'
] as const;

export interface SetupStep {
	key: (typeof SETUP_STEPS)[number];
	isDone: boolean;
	/** Whether the reader's roles do this. */
	isMine: boolean;
	/** The animal to go on with, where the step belongs to one. */
	animal: string | null;
}

const NEEDS: Record<SetupStep['key'], Permission> = {
	project: 'registers.write',
	protocol: 'registers.write',
	arena: 'registers.write',
	'drive-design': 'registers.write',
	animal: 'animals.write',
	implant: 'implants.write',
	session: 'sessions.write'
};

/** The steps with their state, or none once the lab has had a session. */
export async function setupSteps(by: Actor): Promise<SetupStep[]> {
	if (!may(by, 'record.read')) return [];
	const [found] = await select<Record<SetupStep['key'], boolean> & { code: string | null }>(
		`SELECT
			EXISTS (SELECT 1 FROM project WHERE withdrawn_at IS NULL) AS project,
			EXISTS (SELECT 1 FROM protocol WHERE withdrawn_at IS NULL) AS protocol,
			EXISTS (SELECT 1 FROM arena WHERE withdrawn_at IS NULL) AS arena,
			EXISTS (SELECT 1 FROM drive_design WHERE withdrawn_at IS NULL) AS "drive-design",
			EXISTS (SELECT 1 FROM animal WHERE withdrawn_at IS NULL) AS animal,
			EXISTS (SELECT 1 FROM implant WHERE withdrawn_at IS NULL) AS implant,
			EXISTS (SELECT 1 FROM session WHERE withdrawn_at IS NULL) AS session,
			(SELECT code FROM animal a WHERE withdrawn_at IS NULL ORDER BY EXISTS (
				SELECT 1 FROM implant i WHERE i.animal_id = a.id AND i.withdrawn_at IS NULL
			) DESC, created_at LIMIT 1) AS code`,
		{}
	);
	if (found.session) return [];
	return SETUP_STEPS.map((key) => ({
		key,
		isDone: found[key],
		isMine: may(by, NEEDS[key]),
		animal: key === 'implant' || key === 'session' ? found.code : null
	}));
}
