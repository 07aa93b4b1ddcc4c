import { z } from 'zod';

export const labNameSchema = z
	.string()
	.trim()
	.min(1, 'Give the lab a name.')
	.max(80, 'Keep the name within 80 characters.');

export const timeZoneSchema = z
	.string()
	.refine((zone) => zone === 'UTC' || Intl.supportedValuesOf('timeZone').includes(zone), {
		message: 'Not a time zone of the IANA database, like Europe/Oslo.'
	});

export const dayStartSchema = z
	.string()
	.regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Write the hour as 04:00.')
	.refine((time) => time <= '12:00', 'A lab day begins between midnight and noon.');

/** The lab's own values, one schema a key; each change is a new version. */
export const LAB_SETTINGS = {
	lab: z.object({
		name: labNameSchema,
		timeZone: timeZoneSchema,
		dayStartsAt: dayStartSchema,
		isDemo: z.boolean()
	})
} as const;

export type LabSettingKey = keyof typeof LAB_SETTINGS;
export type LabSettingValue<K extends LabSettingKey> = z.infer<(typeof LAB_SETTINGS)[K]>;

export const labSettingsFormSchema = z.object({
	name: labNameSchema,
	dayStartsAt: dayStartSchema,
	version: z.coerce.number().int().min(0)
});
