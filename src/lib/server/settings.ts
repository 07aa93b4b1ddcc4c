import { resolve } from 'node:path';
import { z } from 'zod';

const schema = z.object({
	DATABASE_URL: z.string().startsWith('postgres').optional(),
	SMTP_URL: z.string().startsWith('smtp').optional(),
	MAIL_FROM: z.string().default('Quarterturn <quarterturn@localhost>'),
	STORAGE_URL: z.string().optional(),
	ORIGIN: z.url().optional(),
	PORT: z.coerce.number().int().min(0).max(65535).default(5173),
	SECRET_KEY: z.string().min(16).optional(),
	LAB_TIME_ZONE: z
		.string()
		.refine((zone) => Intl.supportedValuesOf('timeZone').includes(zone) || zone === 'UTC', {
			message: 'not a time zone of the IANA database, like Europe/Oslo'
		})
		.optional(),
	WORKERS: z.coerce.number().int().min(1).max(64).default(2),
	UPLOAD_LIMIT_MB: z.coerce.number().positive().default(4096),
	QUARTERTURN_HOME: z.string().optional(),
	QUARTERTURN_VERSION: z.string().default('0.1.0')
});

export type Settings = ReturnType<typeof parse>;

function parse(env: Record<string, string | undefined>) {
	// An empty line in a settings file means "not set".
	const given = Object.fromEntries(Object.entries(env).filter(([, value]) => value !== ''));
	const read = schema.safeParse(given);
	if (!read.success) {
		const lines = read.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
		throw new Error(`Settings cannot be used.\n${lines.join('\n')}`);
	}
	const home = resolve(read.data.QUARTERTURN_HOME ?? '.quarterturn');
	return {
		databaseUrl: read.data.DATABASE_URL,
		smtpUrl: read.data.SMTP_URL,
		mailFrom: read.data.MAIL_FROM,
		home,
		// With a home of its own, a second lab on one machine shares no folder with the first.
		storageUrl:
			read.data.STORAGE_URL ??
			(read.data.QUARTERTURN_HOME ? resolve(home, 'uploads') : resolve('uploads')),
		origin: read.data.ORIGIN ?? `http://localhost:${read.data.PORT}`,
		port: read.data.PORT,
		secretKey: read.data.SECRET_KEY,
		labTimeZone: read.data.LAB_TIME_ZONE,
		workers: read.data.WORKERS,
		uploadLimitBytes: Math.floor(read.data.UPLOAD_LIMIT_MB * 1024 * 1024),
		version: read.data.QUARTERTURN_VERSION
	};
}

let kept: Settings | undefined;

/** The process's settings, read from the environment once and checked. */
export function settings(): Settings {
	kept ??= parse(process.env);
	return kept;
}

/** For tests that change the environment. */
export function forgetSettings(): void {
	kept = undefined;
}
