import { fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { z } from 'zod';
import { resolve } from '$app/paths';
import { analysisFormSchema } from '$lib/schemas/analysis-parameters';
import { DATA_KINDS } from '$lib/schemas/enumerations';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { reassignSchema } from '$lib/schemas/session';
import { demand, may } from '$lib/server/access';
import { action, page, press } from '$lib/server/http/answer';
import { eachFile } from '$lib/server/http/multipart';
import { Refusal } from '$lib/server/errors';
import { parsed } from '$lib/server/parsed';
import * as analyses from '$lib/server/services/analyses';
import * as dataFiles from '$lib/server/services/data-files';
import { toResultView } from '$lib/server/services/result-view';
import * as sessions from '$lib/server/services/sessions';
import * as sortings from '$lib/server/services/sortings';
import * as takeIn from '$lib/server/services/take-in';
import { settings } from '$lib/server/settings';
import { choiceOf } from './reading-form.server';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

const fileSchema = z.object({ file: z.uuid() });
const kindSchema = z.enum(DATA_KINDS);

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { code, session: id } = event.params;
		const session = await sessions.get(actor, id, { animal: code });
		const [files, cuts, runs] = await Promise.all([
			dataFiles.list(actor, id),
			sortings.list(actor, id),
			analyses.list(actor, id)
		]);
		const wanted = event.url.searchParams.get('analysis') ?? session.currentAnalysisId;
		const shown = runs.find((run) => run.id === wanted) ?? runs.at(0);
		const analysis = shown ? await analyses.get(actor, shown.id, { session: id }) : null;
		const { result, ...run } = analysis ?? { result: null };
		const canWrite = may(actor, 'sessions.write') && !session.withdrawn;
		return {
			session,
			files,
			sortings: cuts,
			analyses: runs,
			analysis: 'id' in run ? run : null,
			result: result && toResultView(result),
			canWrite,
			uploadLimitBytes: settings().uploadLimitBytes,
			analyseForm: await superValidate(
				{ ...(analysis?.parameters ?? {}), arena: analysis?.arenaName ?? '' },
				zod4(analysisFormSchema),
				{ id: 'analyse', errors: false }
			),
			reassignForm: await superValidate(zod4(reassignSchema), { id: 'reassign' }),
			withdrawForm: await superValidate(zod4(withdrawalSchema), { id: 'withdraw' })
		};
	});

/** Nobody acts on another animal's session through a mistyped address. */
async function here({ locals, params }: RequestEvent): Promise<string> {
	demand(locals.actor, 'sessions.write');
	return (await sessions.get(locals.actor, params.session, { animal: params.code })).id;
}

async function fileHere(event: RequestEvent, sent: FormData): Promise<dataFiles.DataFileView> {
	const { file } = parsed(fileSchema, Object.fromEntries(sent));
	return dataFiles.get(event.locals.actor, file, { session: await here(event) });
}

export const actions: Actions = {
	upload: async (event) => {
		const sessionId = await page(event, () => here(event));
		try {
			const files = await eachFile(event.request, ({ name, content, fields }) =>
				dataFiles.receive(event.locals.actor, {
					sessionId,
					kind: kindSchema.safeParse(fields.get('kind')).data ?? null,
					name,
					content
				})
			);
			if (files.length === 0) return fail(422, { refusal: 'Choose a file first.' });
			return { done: 'Received. Look below at what was recognised, then take it in.' };
		} catch (fault) {
			if (!(fault instanceof Refusal)) throw fault;
			return fail(fault.status, { refusal: fault.message });
		}
	},
	lookAgain: (event) =>
		press(event, async (sent) => {
			const { id } = await fileHere(event, sent);
			await dataFiles.lookAgain(event.locals.actor, id, parsed(kindSchema, sent.get('kind')));
			return { done: 'Looked at again.' };
		}),
	takeIn: (event) =>
		press(event, async (sent) => {
			const file = await fileHere(event, sent);
			const taken = await takeIn.takeIn(event.locals.actor, file.id, choiceOf(file, sent));
			return taken.refusal
				? { done: null }
				: { done: `${taken.name} is taken in, ${taken.rows} rows.` };
		}),
	withdrawFile: (event) =>
		press(event, async (sent) => {
			const { id } = await fileHere(event, sent);
			await dataFiles.withdraw(event.locals.actor, id, { why: sent.get('why') ?? '' });
			return { done: 'The file is withdrawn. Its original and finished analyses stay.' };
		}),
	analyse: (event) =>
		action(
			event,
			zod4(analysisFormSchema),
			async ({ sortingId, arena, ...choices }) => {
				const sessionId = await here(event);
				const { id } = await analyses.request(
					event.locals.actor,
					sessionId,
					{ ...choices, ...(arena && { arena }) },
					{ sortingId }
				);
				const { code, session } = event.params;
				const to = resolve('/(lab)/animals/[code]/sessions/[session]', { code, session });
				redirect(303, `${to}?analysis=${id}`);
			},
			'analyse'
		),
	retry: (event) =>
		press(event, async (sent) => {
			const session = await here(event);
			const { analysis } = parsed(z.object({ analysis: z.uuid() }), Object.fromEntries(sent));
			const { id } = await analyses.get(event.locals.actor, analysis, { session });
			await analyses.retry(event.locals.actor, id);
			return { done: 'Tried again; it is in the queue.' };
		}),
	reassign: (event) =>
		action(
			event,
			zod4(reassignSchema),
			async (data) => {
				const session = await here(event);
				await sessions.reassign(event.locals.actor, session, data);
				const code = data.animal.toUpperCase();
				redirect(303, resolve('/(lab)/animals/[code]/sessions/[session]', { code, session }));
			},
			'reassign'
		),
	withdraw: (event) =>
		action(
			event,
			zod4(withdrawalSchema),
			async (data) => {
				await sessions.withdraw(event.locals.actor, await here(event), data);
				return { done: 'The session is withdrawn.' };
			},
			'withdraw'
		)
};
