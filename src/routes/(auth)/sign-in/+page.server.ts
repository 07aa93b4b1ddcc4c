import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { signInSchema } from '$lib/schemas/sign-in';
import { action } from '$lib/server/http/answer';
import { originOf } from '$lib/server/http/origin';
import { safePath } from '$lib/server/http/safe-path';
import * as signIns from '$lib/server/services/sign-ins';
import type { Actions, PageServerLoad } from './$types';

const DONE: Record<string, string> = {
	'signed-out': 'You are signed out.',
	'password-set': 'Your new password is set. Sign in with it.'
};

export const load: PageServerLoad = async ({ locals, url }) => {
	const next = safePath(url.searchParams.get('next'), url.origin);
	if (locals.actor) redirect(303, next);
	const form = await superValidate({ next }, zod4(signInSchema), { errors: false });
	return { form, done: DONE[url.searchParams.get('done') ?? ''] ?? null, theme: locals.theme };
};

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(signInSchema), async ({ email, password, next }) => {
			const cookie = await signIns.signIn({ email, password }, originOf(event));
			event.cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
			redirect(303, safePath(next, event.url.origin));
		})
};
