import type { TestProject } from 'vitest/node';
import { migrate } from '$lib/server/migrations/migrate';
import { DATABASE, withClient } from '../../../src/commands/cluster/roles';
import { openThrowAwayCluster } from '../../../src/commands/cluster/throw-away';
import { TEMPLATE } from './template';

declare module 'vitest' {
	export interface ProvidedContext {
		superUrl: string;
		ownerUrl: string;
		appUrl: string;
		testHome: string;
	}
}

/** One cluster for the whole run, deleted at its end. */
export default async function setup(project: TestProject) {
	const cluster = await openThrowAwayCluster('test');
	try {
		await migrate(cluster.ownerUrl);
		await withClient(cluster.superUrl, (client) =>
			client.query(`ALTER DATABASE ${DATABASE} RENAME TO ${TEMPLATE}`)
		);
	} catch (error) {
		await cluster.stop();
		throw error;
	}
	project.provide('superUrl', cluster.superUrl);
	project.provide('ownerUrl', cluster.ownerUrl);
	project.provide('appUrl', cluster.appUrl);
	project.provide('testHome', cluster.home.folder);
	return () => cluster.stop();
}
