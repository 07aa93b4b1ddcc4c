import pg from 'pg';
import { Sequelize } from 'sequelize';
import { associate } from './models/associate';
import { settings } from './settings';

/** Lengths, weights and counts are read as numbers: none of them comes near 2^53. */
function readNumbers(connection: unknown): void {
	if (!(connection instanceof pg.Client)) return;
	connection.setTypeParser(pg.types.builtins.NUMERIC, Number);
	connection.setTypeParser(pg.types.builtins.INT8, Number);
}

// Kept on globalThis: in development a reload makes this module again, and pools would leak.
const kept = globalThis as typeof globalThis & { quarterturnDb?: Sequelize };

// A reload also makes the models again; those must be defined anew on the kept connection.
let isDefined = false;

/** The one Sequelize of the process, connected as the application's role. */
export function db(): Sequelize {
	if (!kept.quarterturnDb) {
		const url = settings().databaseUrl;
		if (!url) throw new Error('DATABASE_URL is not set; `npm start` sets it for its own cluster.');
		kept.quarterturnDb = new Sequelize(url, {
			dialectModule: pg,
			logging: false,
			hooks: { afterConnect: readNumbers },
			define: { freezeTableName: true, underscored: true, timestamps: false },
			pool: { max: 10, min: 0, idle: 10_000, acquire: 15_000 },
			dialectOptions: { application_name: 'quarterturn', keepAlive: true }
		});
	}
	if (!isDefined) {
		associate(kept.quarterturnDb);
		isDefined = true;
	}
	return kept.quarterturnDb;
}

export async function closeDb(): Promise<void> {
	const open = kept.quarterturnDb;
	kept.quarterturnDb = undefined;
	isDefined = false;
	await open?.close();
}
