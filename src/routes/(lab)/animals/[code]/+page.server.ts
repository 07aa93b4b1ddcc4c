import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { z } from 'zod';
import { fromInputMoment } from '$lib/format/date';
import { joinSchema } from '$lib/schemas/animal';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { weightFormSchema } from '$lib/schemas/weight';
import { demand, may } from '$lib/server/access';
import { action, page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as allocations from '$lib/server/services/allocations';
import * as animals from '$lib/server/services/animals';
import * as deputies from '$lib/server/services/deputies';
import { labClock } from '$lib/server/services/lab-clock';
import * as members from '$lib/server/services/members';
import * as memberships from '$lib/server/services/memberships';
import * as registers from '$lib/server/services/registers';
import * as sessions from '$lib/server/services/sessions';
import * as weights from '$lib/server/services/weights';
import { dayFacts } from './day-facts.server';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { code } = event.params;
		demand(actor, 'animals.read');
		const can = {
			write: may(actor, 'animals.write'),
			weigh: may(actor, 'weights.write'),
			implant: may(actor, 'implants.write'),
			record: may(actor, 'sessions.write'),
			deputise: may(actor, 'deputies.write'),
			readData: may(actor, 'data.read')
		};
		const { animal } = await event.parent();
		const day = event.url.searchParams.get('day');
		const [weighed, recorded, named, people, sealed, protocols, projects, shown] =
			await Promise.all([
				weights.list(actor, code),
				can.readData ? sessions.list(actor, { animal: code }) : [],
				deputies.list(actor, animal.id),
				can.deputise ? members.list(actor) : [],
				may(actor, 'allocations.read') ? allocations.list(actor) : [],
				can.write ? registers.choices(actor, 'protocols') : [],
				can.write ? registers.choices(actor, 'projects') : [],
				day && can.readData ? dayFacts(actor, code, day) : null
			]);
		return {
			can,
			day: shown,
			weights: weighed,
			weightForm: await superValidate(zod4(weightFormSchema), { id: 'weight' }),
			sessions: recorded,
			deputies: named,
			people: people
				.filter(({ id, deactivatedAt }) => !deactivatedAt && id !== actor?.personId)
				.map(({ id, name }) => ({ value: id, label: name })),
			allocations: sealed.filter((row) => row.animalId === animal.id),
			protocols,
			projects
		};
	});

const leaveSchema = z.object({ kind: z.enum(['protocol', 'project']), id: z.uuid() });
const idSchema = z.object({ id: z.uuid() });
const fields = (sent: FormData) =>
	Object.fromEntries([...sent].filter(([, value]) => value !== ''));

export const actions: Actions = {
	weigh: (event) =>
		action(
			event,
			zod4(weightFormSchema),
			async ({ measuredAt, ...entry }) => {
				const { zone } = await labClock();
				const at = measuredAt ? fromInputMoment(measuredAt, zone) : null;
				await weights.record(event.locals.actor, event.params.code, { ...entry, measuredAt: at });
				return { done: 'The weight is entered.' };
			},
			'weight'
		),
	withdrawWeight: (event) =>
		press(event, async (sent) => {
			const { id, why } = parsed(withdrawalSchema.extend(idSchema.shape), fields(sent));
			await weights.withdraw(event.locals.actor, event.params.code, id, { why });
			return { done: 'The weight is withdrawn; it stays readable with the reason.' };
		}),
	joinProtocol: (event) =>
		press(event, async (sent) => {
			const join = parsed(joinSchema, fields(sent));
			await memberships.joinProtocol(event.locals.actor, event.params.code, join);
			return { done: 'The animal is on the protocol.' };
		}),
	joinProject: (event) =>
		press(event, async (sent) => {
			const join = parsed(joinSchema, fields(sent));
			await memberships.joinProject(event.locals.actor, event.params.code, join);
			return { done: 'The animal is in the project.' };
		}),
	leave: (event) =>
		press(event, async (sent) => {
			const { kind, id } = parsed(leaveSchema, fields(sent));
			await memberships.leave(event.locals.actor, event.params.code, kind, id);
			return { done: 'Ended from today on; the days before stay.' };
		}),
	nameDeputy: (event) =>
		press(event, async (sent) => {
			const { actor } = event.locals;
			const animal = await animals.get(actor, event.params.code);
			await deputies.name(actor, animal.id, parsed(idSchema, fields(sent)).id);
			return { done: 'Named as deputy: may answer advice and set targets for this animal.' };
		}),
	endDeputy: (event) =>
		press(event, async (sent) => {
			await deputies.end(event.locals.actor, parsed(idSchema, fields(sent)).id);
			return { done: 'Not a deputy any more.' };
		}),
	unseal: (event) =>
		press(event, async (sent) => {
			const { id } = parsed(idSchema, fields(sent));
			const { groupLabel } = await allocations.read(event.locals.actor, id);
			return { unsealed: { id, groupLabel } };
		})
};
