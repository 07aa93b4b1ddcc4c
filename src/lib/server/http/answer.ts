import { error, fail, redirect, type ActionFailure, type RequestEvent } from '@sveltejs/kit';
import { setError, superValidate, type SuperValidated } from 'sveltekit-superforms';
import type { ValidationAdapter } from 'sveltekit-superforms/adapters';
import {
	Conflict,
	Gone,
	Invalid,
	Refusal,
	TooLarge,
	TooMany,
	Unauthenticated
} from '$lib/server/errors';

/**
 * Turns a service's refusal into what a page answers: sign-in when nobody is signed in,
 * else the status with the refusal's own sentence. Bugs pass through to `handleError`.
 */
export async function page<T>(event: RequestEvent, work: () => Promise<T>): Promise<T> {
	try {
		return await work();
	} catch (fault) {
		if (fault instanceof Unauthenticated) redirect(303, signInAddress(event));
		if (fault instanceof Refusal) error(fault.status, fault.message);
		throw fault;
	}
}

type Fields = Record<string, unknown>;

/**
 * A form's action: reads the form by its schema, does the work, and maps what a service refuses:
 * refused input and conflicts stand beside the fields with everything typed kept, nobody signed
 * in leads to sign-in, not allowed or not there is an error page.
 * @param adapter `zod4(schema)`; @param id set when a page has several forms
 */
export async function action<Out extends Fields, In extends Fields, R extends Fields | undefined>(
	event: RequestEvent,
	adapter: ValidationAdapter<Out, In>,
	work: (data: Out) => Promise<R>,
	id?: string
): Promise<
	| ({ form: SuperValidated<Out, string, In> } & R)
	| ActionFailure<{ form: SuperValidated<Out, string, In> }>
> {
	const form = await superValidate<Out, string, In>(event.request, adapter, id ? { id } : {});
	if (!form.valid) return fail(422, { form: withoutPasswords(form) });
	try {
		return { form, ...(await work(form.data)) };
	} catch (fault) {
		if (fault instanceof Unauthenticated) redirect(303, signInAddress(event));
		if (!isFormRefusal(fault)) {
			if (fault instanceof Refusal) error(fault.status, fault.message);
			throw fault;
		}
		const issues =
			fault instanceof Invalid ? fault.issues : [{ field: '', message: fault.message }];
		for (const { field, message } of issues) {
			// A field this form does not show would be an error nobody sees.
			const isShown = field !== '' && splitField(field)[0] in form.data;
			setError<Fields, string, string, Fields>(form, isShown ? field : '', message);
		}
		return fail(fault.status, { form: withoutPasswords(form) });
	}
}

/**
 * The action of a button without fields of its own: a refusal comes back as `{ refusal }`.
 */
export async function press<R extends Fields | undefined>(
	event: RequestEvent,
	work: (sent: FormData) => Promise<R>
): Promise<R | ActionFailure<{ refusal: string }>> {
	try {
		return await work(await event.request.formData());
	} catch (fault) {
		if (fault instanceof Unauthenticated) redirect(303, signInAddress(event));
		if (isFormRefusal(fault)) return fail(fault.status, { refusal: fault.message });
		if (fault instanceof Refusal) error(fault.status, fault.message);
		throw fault;
	}
}

function isFormRefusal(fault: unknown): fault is Invalid | Conflict | Gone | TooMany | TooLarge {
	return (
		fault instanceof Invalid ||
		fault instanceof Conflict ||
		fault instanceof Gone ||
		fault instanceof TooMany ||
		fault instanceof TooLarge
	);
}

function splitField(field: string): string[] {
	return field.split(/[.[\]]+/);
}

/** A password is typed again rather than sent back inside a page. */
function withoutPasswords<Out extends Fields, In extends Fields>(
	form: SuperValidated<Out, string, In>
): SuperValidated<Out, string, In> {
	for (const name of Object.keys(form.data)) {
		if (/password/i.test(name)) Object.assign(form.data, { [name]: '' });
	}
	return form;
}

export function signInAddress(event: RequestEvent): string {
	const back = event.request.method === 'GET' ? event.url.pathname + event.url.search : '/';
	return `/sign-in?next=${encodeURIComponent(back)}`;
}
