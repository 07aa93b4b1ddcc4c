import type { Includeable, Model, ModelStatic } from 'sequelize';
import { readArena } from '$lib/schemas/arena-reading';
import { pitchOfThread } from '$lib/schemas/drive-threads';
import type { FieldValues } from '$lib/schemas/register-descriptor';
import type { RegisterKind } from '$lib/schemas/registers';
import { AnimalProject } from '$lib/server/models/animal-project';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { Arena } from '$lib/server/models/arena';
import { Drive } from '$lib/server/models/drive';
import { DriveDesign } from '$lib/server/models/drive-design';
import { Implant } from '$lib/server/models/implant';
import { Project } from '$lib/server/models/project';
import { Protocol } from '$lib/server/models/protocol';
import { ProtocolPerson } from '$lib/server/models/protocol-person';
import { Rig } from '$lib/server/models/rig';
import type { Write } from '$lib/server/record';
import { nameOnProtocol } from './protocol-people';

/** What the shared service cannot know of one register: its table, and what hangs on a row. */
export interface RegisterTable {
	/** As the log calls a row. */
	subject: string;
	model: ModelStatic<Model>;
	orderBy: string;
	include: Includeable[];
	/** Values counted or looked up, for all rows of a list at once. */
	lookUp(rows: Row[], today: string): Promise<Map<string, FieldValues>>;
	/** From what the form says to what the table holds. */
	toColumns(values: FieldValues): FieldValues;
	/** Rows of other tables that follow the form, in the same transaction. */
	follow(w: Write, id: string, values: FieldValues, today: string): Promise<void>;
}

/** A row as the model gives it, before it is made narrow. */
export type Row = Record<string, unknown> & { id: string };

const plain = {
	include: [],
	lookUp: async () => new Map(),
	toColumns: (values: FieldValues) => values,
	follow: async () => undefined
};

const ids = (rows: Row[]) => rows.map((row) => row.id);

function forEach(rows: Row[], values: (row: Row) => FieldValues): Map<string, FieldValues> {
	return new Map(rows.map((row) => [row.id, values(row)]));
}

export const registerTables: Record<RegisterKind, RegisterTable> = {
	projects: {
		...plain,
		subject: 'project',
		model: Project,
		orderBy: 'name',
		async lookUp(rows, today) {
			const now = await AnimalProject.countOn(ids(rows), today);
			return forEach(rows, ({ id }) => ({ animalsNow: now.get(id) ?? 0 }));
		}
	},
	protocols: {
		...plain,
		subject: 'protocol',
		model: Protocol,
		orderBy: 'number',
		async lookUp(rows, today) {
			const [used, people] = await Promise.all([
				AnimalProtocol.countEver(ids(rows)),
				ProtocolPerson.namedOn(ids(rows), today)
			]);
			return forEach(rows, ({ id, animalsAllowed, expiresOn }) => ({
				people: people.get(id) ?? [],
				animalsLeft: Number(animalsAllowed) - (used.get(id) ?? 0),
				isExpired: String(expiresOn) < today
			}));
		},
		async follow(w, id, { people }, today) {
			await nameOnProtocol(w, id, Array.isArray(people) ? people : [], today);
		}
	},
	arenas: {
		...plain,
		subject: 'arena',
		model: Arena,
		orderBy: 'name',
		lookUp: async (rows) =>
			forEach(rows, ({ description, binCm }) => ({
				reading: readArena(String(description), Number(binCm)).words
			}))
	},
	rigs: { ...plain, subject: 'rig', model: Rig, orderBy: 'name' },
	'drive-designs': {
		...plain,
		subject: 'drive-design',
		model: DriveDesign,
		orderBy: 'name',
		toColumns: (values) => ({
			...values,
			pitchUm: Number(values.pitchUm) || pitchOfThread(String(values.thread))
		})
	},
	drives: {
		...plain,
		subject: 'drive',
		model: Drive,
		orderBy: 'serial',
		include: [{ association: 'design', attributes: ['name'] }],
		async lookUp(rows) {
			const implants = await Implant.findAll({
				where: { driveId: ids(rows), withdrawnAt: null },
				include: [{ association: 'animal', attributes: ['code'] }]
			});
			const codes = new Map(implants.map(({ driveId, animal }) => [driveId, animal?.code]));
			return forEach(rows, (row) => ({
				designName:
					row.design instanceof Object && 'name' in row.design ? String(row.design.name) : '',
				usedIn: codes.get(row.id) ?? ''
			}));
		}
	}
};
