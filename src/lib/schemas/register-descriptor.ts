import type { z } from 'zod';

export type FieldValue = string | number | boolean | null | string[];
export type FieldValues = Record<string, FieldValue>;

/** One field of a register's form. The form is drawn from these; the schema decides. */
export interface RegisterField {
	name: string;
	label: string;
	kind:
		| 'line'
		| 'code'
		| 'text'
		| 'figure'
		| 'day'
		| 'choice'
		| 'yes-no'
		/** Named members of the lab. */
		| 'people'
		/** A row of the register in `from`. */
		| 'register'
		/** A line whose reading is shown in plain words while it is typed. */
		| 'arena'
		/** A choice that fills in the pitch. */
		| 'thread';
	section: string;
	unit?: string;
	hint?: string;
	isRequired?: boolean;
	options?: { value: string; label: string }[];
	from?: string;
}

/** One column of a register's list; the first one leads to the row. */
export interface RegisterColumn {
	name: string;
	label: string;
	isFigure?: boolean;
	unit?: string;
	/** How the value reads when it is not shown as it is. */
	words?: Record<string, string>;
}

/** All that differs between one register and the next. */
export interface RegisterDescriptor {
	/** "arena", "arenas": as used inside a sentence. */
	singular: string;
	plural: string;
	title: string;
	/** What the register is for, in one sentence. */
	purpose: string;
	/** The value a row is called by. */
	nameField: string;
	schema: z.ZodObject<Record<string, z.ZodType<FieldValue>>>;
	/** What a new row's form starts with. */
	blank: FieldValues;
	fields: RegisterField[];
	columns: RegisterColumn[];
}
