import type { CreationAttributes } from 'sequelize';
import { db } from '$lib/server/db';
import { Project } from '$lib/server/models/project';
import { nextNumber } from './sequence';

/** A project. */
export async function makeProject(
	fields: Partial<CreationAttributes<Project>> = {}
): Promise<Project> {
	db();
	return Project.create({
		name: `Project ${nextNumber()}`,
		...fields
	});
}
