import { json } from '@sveltejs/kit';

/** The process answers; whether it can do its work is asked of the health address. */
export const GET = () => json({ ok: true }, { headers: { 'cache-control': 'no-store' } });
