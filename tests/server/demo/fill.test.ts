import { QueryTypes } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { systemActor } from '$lib/server/access';
import { setClock } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { isPassword } from '$lib/server/auth/password';
import { startWorker } from '$lib/server/jobs/worker';
import { Person } from '$lib/server/models/person';
import * as animals from '$lib/server/services/animals';
import * as labSettings from '$lib/server/services/lab-settings';
import * as sessions from '$lib/server/services/sessions';
import * as tallies from '$lib/server/services/tallies';
import * as turns from '$lib/server/services/turns';
import * as weights from '$lib/server/services/weights';
import { DEMO_ANIMALS, type DemoAnimal } from '../../../src/demo/animals';
import { fillWith } from '../../../src/demo/fill';
import { signIns } from '../../../src/demo/sign-ins';
import { ended } from '../data/lab';

const by = systemActor();

/** Two recorded days of two minutes each. */
const small: DemoAnimal = {
	...DEMO_ANIMALS[0],
	surgeryDaysAgo: 4,
	lowering: [0.5, 0.25],
	recordedDays: 2,
	sessions: [{ place: 'track', time: '10:05', durationS: 150, everyDays: 1 }]
};

const counted = async (sql: string) => {
	const [{ n }] = await db().query<{ n: number }>(`SELECT count(*) AS n FROM ${sql}`, {
		type: QueryTypes.SELECT
	});
	return n;
};

describe('the demo lab', () => {
	beforeAll(async () => {
		setClock(() => new Date('2026-03-10T15:00:00Z'));
		await fillWith([small], () => undefined);
	}, 120_000);

	it('says that it is one, and that its animals are simulated', async () => {
		expect(await labSettings.get('lab')).toMatchObject({ isDemo: true });
		expect(await animals.get(by, 'R031')).toMatchObject({ isSimulated: true });
	});

	it('lets every role in with the password that the start prints', async () => {
		const people = await Person.withRoles();
		expect(people).toHaveLength(signIns.length);
		for (const { email, password, role } of signIns) {
			const person = await Person.findOne({ where: { email }, rejectOnEmpty: true });
			expect(await isPassword(person.passwordHash, password)).toBe(true);
			expect(people.find(({ id }) => id === person.id)?.roles).toEqual([role]);
		}
	});

	it('ends today, its turns folding to the depth that was planned', async () => {
		const cells = await animals.strip(by, 'R031');
		expect(cells.at(-1)).toMatchObject({ day: '2026-03-10' });
		expect(cells).toHaveLength(5);
		const [first] = await turns.position(by, 'R031');
		expect(first).toMatchObject({ screwUm: 0.75 * 317.5, depthUm: 950 + 0.75 * 317.5 });
	});

	it('was entered at its own moments, so nothing is marked as entered later', async () => {
		expect(await counted('turn WHERE is_entered_later')).toBe(0);
		expect(await counted('tally WHERE is_entered_later')).toBe(0);
		expect(await counted("log WHERE at > '2026-03-10T15:00:00Z'")).toBe(0);
	});

	it('keeps every animal above the floor of its protocol', async () => {
		const rows = await weights.list(by, 'R031');
		expect(rows.length).toBeGreaterThan(5);
		expect(rows.every(({ isBelowFloor, floorG }) => floorG !== null && !isBelowFloor)).toBe(true);
	});

	it('has units counted by eye, none for bundles nobody counted', async () => {
		const rows = await tallies.list(by, 'R031', '2026-03-10');
		expect(rows).toHaveLength(15);
		expect(rows.every(({ principal }) => principal !== null)).toBe(true);
	});

	it('takes its sessions in as uploads, with an analysis asked for', async () => {
		const rows = await sessions.list(by, { animal: 'R031' });
		expect(rows).toHaveLength(2);
		expect(await counted("data_file WHERE state = 'taken-in' AND warnings = '[]'")).toBe(6);
		expect(await counted("analysis WHERE state = 'queued'")).toBe(2);
		expect(await counted("pgboss.job WHERE name = 'analyse'")).toBe(2);
		expect(await counted('unit WHERE bundle_id IS NOT NULL AND class IS NOT NULL')).toBe(
			await counted('unit')
		);
	});

	it('is analysed by the worker, and place is read from it', async () => {
		const [{ id }] = await db().query<{ id: string }>('SELECT id FROM analysis LIMIT 1', {
			type: QueryTypes.SELECT
		});
		const worker = await startWorker();
		try {
			const { state, result } = await ended(by, id, 60_000);
			expect(state).toBe('done');
			expect(result?.decoding.medianErrorCm).toBeLessThan(30);
		} finally {
			await worker.stop();
		}
	}, 90_000);

	it('is left alone when it is asked for again', async () => {
		const before = await counted('log');
		await fillWith([small], () => undefined);
		expect(await counted('log')).toBe(before);
	});
});
