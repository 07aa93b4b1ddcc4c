import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { z } from 'zod';
import { passwordChangeSchema, profileSchema, tokenSchema } from '$lib/schemas/people';
import { action, page, press } from '$lib/server/http/answer';
import { timeZones } from '$lib/server/lab-time';
import { parsed } from '$lib/server/parsed';
import * as passwords from '$lib/server/services/passwords';
import * as people from '$lib/server/services/people';
import * as signIns from '$lib/server/services/sign-ins';
import * as tokens from '$lib/server/services/tokens';
import type { Actions, PageServerLoad } from './$types';

const browserSchema = z.object({ key: z.string().length(64) });
const revokeSchema = z.object({ id: z.uuid() });

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor, sessionId } = event.locals;
		const [profile, browsers, ownTokens] = await Promise.all([
			people.profile(actor),
			signIns.list(actor, sessionId),
			tokens.list(actor)
		]);
		const { name, timeZone, revision } = profile;
		const [profileForm, passwordForm, tokenForm] = await Promise.all([
			superValidate({ name, timeZone: timeZone ?? '', revision }, zod4(profileSchema), {
				id: 'profile'
			}),
			superValidate(zod4(passwordChangeSchema), { id: 'password' }),
			superValidate(zod4(tokenSchema), { id: 'token' })
		]);
		return {
			profile,
			browsers,
			tokens: ownTokens,
			timeZones: timeZones(),
			profileForm,
			passwordForm,
			tokenForm
		};
	});

export const actions: Actions = {
	profile: (event) =>
		action(
			event,
			zod4(profileSchema),
			async (data) => {
				await people.editProfile(event.locals.actor, data);
				return { done: 'Your profile is saved.' };
			},
			'profile'
		),
	password: (event) =>
		action(
			event,
			zod4(passwordChangeSchema),
			async (data) => {
				const { actor, sessionId } = event.locals;
				await passwords.change(actor, data, sessionId);
				return { done: 'Your password is changed. Your other browsers are signed out.' };
			},
			'password'
		),
	makeToken: (event) =>
		action(
			event,
			zod4(tokenSchema),
			async (data) => ({ freshToken: await tokens.create(event.locals.actor, data) }),
			'token'
		),
	revokeToken: (event) =>
		press(event, async (sent) => {
			const { id } = parsed(revokeSchema, Object.fromEntries(sent));
			await tokens.revoke(event.locals.actor, id);
			return { done: 'The token is revoked. Scripts that use it are refused from now on.' };
		}),
	endBrowser: (event) =>
		press(event, async (sent) => {
			const { key } = parsed(browserSchema, Object.fromEntries(sent));
			await signIns.end(event.locals.actor, key);
			return { done: 'That browser is signed out.' };
		}),
	endOthers: (event) =>
		press(event, async () => {
			const { actor, sessionId } = event.locals;
			const ended = await signIns.endOthers(actor, sessionId);
			return { done: `Signed out elsewhere: ${ended}. This browser stays signed in.` };
		})
};
