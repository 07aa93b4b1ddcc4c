import type { Home } from '../home/home';
import { secretsOf } from '../home/secrets';
import type { LabDatabase } from './database';

export interface WebPlace {
	port: number;
	host: string;
	address: string;
}

/** What the web and worker processes are told. The owner's address is not among it. */
export function childEnv(home: Home, database: LabDatabase, web: WebPlace): NodeJS.ProcessEnv {
	const { DATABASE_OWNER_URL: _owner, ...outside } = process.env;
	return {
		...outside,
		DATABASE_URL: database.appUrl,
		SECRET_KEY: process.env.SECRET_KEY || secretsOf(home).secretKey,
		// A home that was asked for is told in full; the usual one is known without.
		...(process.env.QUARTERTURN_HOME ? { QUARTERTURN_HOME: home.folder } : {}),
		PORT: String(web.port),
		HOST: web.host,
		ORIGIN: process.env.ORIGIN || web.address,
		// The application checks sizes itself and says so; the adapter's 512 K would cut uploads off.
		BODY_SIZE_LIMIT: 'Infinity',
		// Pages that listen for progress hold their connection; a stop does not wait long for them.
		SHUTDOWN_TIMEOUT: '3'
	};
}
