/** One forward step of the schema. Never edited once released: a later step mends it. */
export interface Migration {
	name: string;
	sql: string;
}
