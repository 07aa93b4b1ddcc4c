import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { z } from 'zod';
import { inviteSchema } from '$lib/schemas/people';
import { roleSchema } from '$lib/schemas/roles';
import { may } from '$lib/server/access';
import { action, page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as invitations from '$lib/server/services/invitations';
import * as members from '$lib/server/services/members';
import type { Actions, PageServerLoad } from './$types';

const invitationSchema = z.object({ id: z.uuid() });
const personSchema = z.object({ personId: z.uuid() });
const roleChangeSchema = personSchema.extend({ role: roleSchema });
const blindedSchema = personSchema.extend({ isBlinded: z.stringbool() });

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const canChange = may(actor, 'members.write');
		const [everybody, open, form] = await Promise.all([
			members.list(actor),
			canChange ? invitations.list(actor) : [],
			superValidate(zod4(inviteSchema))
		]);
		return {
			members: everybody,
			invitations: open,
			canChange,
			isPi: actor?.roles.has('pi') ?? false,
			inviteForm: form
		};
	});

export const actions: Actions = {
	invite: (event) =>
		action(event, zod4(inviteSchema), async (data) => {
			await invitations.invite(event.locals.actor, data);
			return { done: `An invitation to ${data.email} is on its way.` };
		}),
	resend: (event) =>
		press(event, async (sent) => {
			const { id } = parsed(invitationSchema, Object.fromEntries(sent));
			await invitations.resend(event.locals.actor, id);
			return { done: 'Sent again with a new address; the one sent before opens nothing now.' };
		}),
	withdraw: (event) =>
		press(event, async (sent) => {
			const { id } = parsed(invitationSchema, Object.fromEntries(sent));
			await invitations.withdraw(event.locals.actor, id);
			return { done: 'The invitation is withdrawn; its address opens nothing now.' };
		}),
	grant: (event) =>
		press(event, async (sent) => {
			const { personId, role } = parsed(roleChangeSchema, Object.fromEntries(sent));
			await members.grant(event.locals.actor, personId, role);
			return { done: 'The role is given, from the next click of that person on.' };
		}),
	revoke: (event) =>
		press(event, async (sent) => {
			const { personId, role } = parsed(roleChangeSchema, Object.fromEntries(sent));
			await members.revoke(event.locals.actor, personId, role);
			return { done: 'The role is taken, from the next click of that person on.' };
		}),
	blind: (event) =>
		press(event, async (sent) => {
			const { personId, isBlinded } = parsed(blindedSchema, Object.fromEntries(sent));
			await members.setBlinded(event.locals.actor, personId, isBlinded);
			return {
				done: isBlinded
					? 'Marked blinded: sealed allocations are hidden from this person.'
					: 'Not blinded any more: this person can open sealed allocations, each time logged.'
			};
		}),
	deactivate: (event) =>
		press(event, async (sent) => {
			const { personId } = parsed(personSchema, Object.fromEntries(sent));
			await members.deactivate(event.locals.actor, personId);
			return { done: 'Deactivated: signed out everywhere, tokens revoked. Their records stay.' };
		}),
	reactivate: (event) =>
		press(event, async (sent) => {
			const { personId } = parsed(personSchema, Object.fromEntries(sent));
			await members.reactivate(event.locals.actor, personId);
			return { done: 'This person can sign in again, with the roles they held.' };
		})
};
