import { Refusal } from '../bootstrap/refusal.mjs';
import type { Home } from '../home/home';
import { secretsOf } from '../home/secrets';
import { say } from '../machine/say';
import { clusterMajor, dataFolder, ensureData, SUPERUSER } from './data-folder';
import { findPlace, keepPlace, knownPlace } from './place';
import { postgresPrograms } from './programs';
import { resetSuperuserPassword } from './reset-password';
import { APP, DATABASE, ensureRoles, OWNER, urlOf } from './roles';
import { startServer, type RunningServer, type ServerOptions } from './server';
import { serverUser } from './server-user';

export interface ClusterUrls {
	/** May change the schema; never handed to the web process. */
	ownerUrl: string;
	appUrl: string;
	/** Makes roles and databases; used here and by test set-up only. */
	superUrl: string;
}

export interface Cluster extends ClusterUrls {
	/** Rejects when the server ended and could not be started again; never settles otherwise. */
	failed: Promise<never>;
	stop(): Promise<void>;
	kill(): void;
}

/**
 * The lab's own PostgreSQL: made on first use, then started. The caller holds the home's lock.
 * The server ends with this process, however that ends; one that dies is started again.
 *
 * @param isThrowAway gives up safety on a power cut for speed; for clusters deleted afterwards
 */
export async function openCluster(home: Home, isThrowAway = false): Promise<Cluster> {
	const secrets = secretsOf(home);
	const known = knownPlace(home);
	const programs = await postgresPrograms(known && clusterMajor(known.folder));
	const user = serverUser(dataFolder(known?.folder ?? home.file('postgres')));
	const place = known?.folder ?? findPlace(home, user);
	await ensureData(place, programs, user, secrets.superuserPassword, isThrowAway);

	const options: ServerOptions = {
		program: programs.program('postgres'),
		place,
		user,
		port: known?.port,
		logFile: home.logFile('postgres'),
		isThrowAway
	};
	const passwords = { owner: secrets.ownerPassword, app: secrets.appPassword };
	let server = await startServer(options);
	try {
		await ensureRoles(clusterUrls(home, server.port).superUrl, passwords);
	} catch (error) {
		await server.process.stop();
		if (!isWrongPassword(error)) throw error;
		resetSuperuserPassword(options.program, place, user, secrets.superuserPassword);
		server = await startServer(options);
		await ensureRoles(clusterUrls(home, server.port).superUrl, passwords);
	}
	keepPlace(home, { folder: place, port: server.port });
	return { ...clusterUrls(home, server.port), ...keepServing(server, options) };
}

/** Starts a server that died again, on the same port: those who use it know no other. */
function keepServing({ port, process }: RunningServer, options: ServerOptions) {
	let current = process;
	let isStopping = false;
	const watch = async (): Promise<never> => {
		for (;;) {
			const code = await current.ended;
			if (isStopping) return new Promise<never>(() => undefined);
			say(`The database server ended (exit ${code}); starting it again.`);
			const next = await startServer({ ...options, port });
			current = next.process;
			if (isStopping || next.port !== port) await current.stop();
			if (next.port !== port) {
				throw new Refusal(
					`The database server ended, and another program has taken its port ${port}. The records are safe. Start again.`
				);
			}
		}
	};
	const failed = watch();
	failed.catch(() => undefined);
	return {
		failed,
		kill: () => current.kill(),
		async stop() {
			isStopping = true;
			await current.stop();
		}
	};
}

function isWrongPassword(error: unknown): boolean {
	return error instanceof Error && 'code' in error && error.code === '28P01';
}

/** How to reach the cluster of a home whose server runs on this port. */
export function clusterUrls(home: Home, port: number): ClusterUrls {
	const secrets = secretsOf(home);
	const login = (user: string, password: string, database = DATABASE) =>
		urlOf({ user, password, port, database });
	return {
		ownerUrl: login(OWNER, secrets.ownerPassword),
		appUrl: login(APP, secrets.appPassword),
		superUrl: login(SUPERUSER, secrets.superuserPassword, 'postgres')
	};
}
