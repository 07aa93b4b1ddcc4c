import type { Sequelize } from 'sequelize';
import { Analysis } from './analysis';
import { Animal } from './animal';
import { AnimalProject } from './animal-project';
import { AnimalProtocol } from './animal-protocol';
import { ApiToken } from './api-token';
import { Arena } from './arena';
import { AuthSession } from './auth-session';
import { Bundle } from './bundle';
import { BundleRole } from './bundle-role';
import { Carriage } from './carriage';
import { Channel } from './channel';
import { DataFile } from './data-file';
import { Day } from './day';
import { Deputy } from './deputy';
import { Drive } from './drive';
import { DriveDesign } from './drive-design';
import { Epoch } from './epoch';
import { Exclusion } from './exclusion';
import { IdempotencyKey } from './idempotency-key';
import { Implant } from './implant';
import { Invitation } from './invitation';
import { LabSetting } from './lab-setting';
import { Landmark } from './landmark';
import { Outbox } from './outbox';
import { PasswordReset } from './password-reset';
import { Person } from './person';
import { Project } from './project';
import { Protocol } from './protocol';
import { ProtocolPerson } from './protocol-person';
import { Rig } from './rig';
import { RoleGrant } from './role-grant';
import { SealedAllocation } from './sealed-allocation';
import { Session } from './session';
import { Site } from './site';
import { Sorting } from './sorting';
import { SortingSession } from './sorting-session';
import { Tally } from './tally';
import { Turn } from './turn';
import { Unit } from './unit';
import { Weight } from './weight';

/** Read when called, not when imported: a model whose query needs `db` is on its way here too. */
const models = () => [
	Analysis,
	Animal,
	AnimalProject,
	AnimalProtocol,
	ApiToken,
	Arena,
	AuthSession,
	Bundle,
	BundleRole,
	Carriage,
	Channel,
	DataFile,
	Day,
	Deputy,
	Drive,
	DriveDesign,
	Epoch,
	Exclusion,
	IdempotencyKey,
	Implant,
	Invitation,
	LabSetting,
	Landmark,
	Outbox,
	PasswordReset,
	Person,
	Project,
	Protocol,
	ProtocolPerson,
	Rig,
	RoleGrant,
	SealedAllocation,
	Session,
	Site,
	Sorting,
	SortingSession,
	Tally,
	Turn,
	Unit,
	Weight
];

/** Defines every model on `sequelize` and wires the relations that queries include. */
export function associate(sequelize: Sequelize): void {
	for (const model of models()) model.define(sequelize);
	Person.hasMany(RoleGrant, { as: 'roleGrants', foreignKey: 'personId' });
	RoleGrant.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Animal.hasMany(AnimalProtocol, { as: 'protocols', foreignKey: 'animalId' });
	AnimalProtocol.belongsTo(Animal, { as: 'animal', foreignKey: 'animalId' });
	Animal.hasMany(AnimalProject, { as: 'projects', foreignKey: 'animalId' });
	AnimalProject.belongsTo(Animal, { as: 'animal', foreignKey: 'animalId' });
	Animal.hasMany(Weight, { as: 'weights', foreignKey: 'animalId' });
	Weight.belongsTo(Animal, { as: 'animal', foreignKey: 'animalId' });
	Weight.belongsTo(Person, { as: 'measurer', foreignKey: 'measuredBy' });
	Animal.hasMany(Implant, { as: 'implants', foreignKey: 'animalId' });
	Implant.belongsTo(Animal, { as: 'animal', foreignKey: 'animalId' });
	Implant.hasMany(Site, { as: 'sites', foreignKey: 'implantId' });
	Site.belongsTo(Implant, { as: 'implant', foreignKey: 'implantId' });
	Site.hasMany(Carriage, { as: 'carriages', foreignKey: 'siteId' });
	Carriage.belongsTo(Site, { as: 'site', foreignKey: 'siteId' });
	Carriage.hasMany(Bundle, { as: 'bundles', foreignKey: 'carriageId' });
	Bundle.belongsTo(Carriage, { as: 'carriage', foreignKey: 'carriageId' });
	Bundle.hasMany(BundleRole, { as: 'roles', foreignKey: 'bundleId' });
	BundleRole.belongsTo(Bundle, { as: 'bundle', foreignKey: 'bundleId' });
	Bundle.hasMany(Channel, { as: 'channels', foreignKey: 'bundleId' });
	Channel.belongsTo(Bundle, { as: 'bundle', foreignKey: 'bundleId' });
	Animal.hasMany(Session, { as: 'sessions', foreignKey: 'animalId' });
	Session.belongsTo(Animal, { as: 'animal', foreignKey: 'animalId' });
	Day.hasMany(Session, { as: 'sessions', foreignKey: 'dayId' });
	Session.belongsTo(Day, { as: 'day', foreignKey: 'dayId' });
	Session.hasMany(Epoch, { as: 'epochs', foreignKey: 'sessionId' });
	Epoch.belongsTo(Session, { as: 'session', foreignKey: 'sessionId' });
	Sorting.hasMany(Unit, { as: 'units', foreignKey: 'sortingId' });
	Unit.belongsTo(Sorting, { as: 'sorting', foreignKey: 'sortingId' });
	Session.hasMany(DataFile, { as: 'files', foreignKey: 'sessionId' });
	DataFile.belongsTo(Session, { as: 'session', foreignKey: 'sessionId' });
	Session.hasMany(Analysis, { as: 'analyses', foreignKey: 'sessionId' });
	Analysis.belongsTo(Session, { as: 'session', foreignKey: 'sessionId' });
	Day.hasMany(Tally, { as: 'tallies', foreignKey: 'dayId' });
	Tally.belongsTo(Day, { as: 'day', foreignKey: 'dayId' });
	Animal.hasMany(Day, { as: 'days', foreignKey: 'animalId' });
	Day.belongsTo(Animal, { as: 'animal', foreignKey: 'animalId' });
	AnimalProtocol.belongsTo(Protocol, { as: 'protocol', foreignKey: 'protocolId' });
	AnimalProject.belongsTo(Project, { as: 'project', foreignKey: 'projectId' });
	Epoch.belongsTo(Arena, { as: 'arena', foreignKey: 'arenaId' });
	Session.belongsTo(Rig, { as: 'rig', foreignKey: 'rigId' });
	Session.belongsTo(Arena, { as: 'arena', foreignKey: 'arenaId' });
	Session.belongsTo(Person, { as: 'creator', foreignKey: 'createdBy' });
	DataFile.belongsTo(Person, { as: 'uploader', foreignKey: 'uploadedBy' });
	Sorting.hasMany(SortingSession, { as: 'covers', foreignKey: 'sortingId' });
	SortingSession.belongsTo(Sorting, { as: 'sorting', foreignKey: 'sortingId' });
	Implant.belongsTo(DriveDesign, { as: 'driveDesign', foreignKey: 'driveDesignId' });
	Implant.belongsTo(Drive, { as: 'drive', foreignKey: 'driveId' });
	Implant.belongsTo(Person, { as: 'surgeon', foreignKey: 'surgeonId' });
	Drive.belongsTo(DriveDesign, { as: 'design', foreignKey: 'designId' });
	Sorting.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	ProtocolPerson.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Analysis.belongsTo(Sorting, { as: 'sorting', foreignKey: 'sortingId' });
	Turn.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Tally.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Landmark.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Exclusion.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
	Tally.belongsTo(Bundle, { as: 'bundle', foreignKey: 'bundleId' });
	Landmark.belongsTo(Bundle, { as: 'bundle', foreignKey: 'bundleId' });
}
