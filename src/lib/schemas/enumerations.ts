/** Closed lists of words, as the database checks them. A test compares the two. */

export const THEMES = ['bench', 'evening', 'red'] as const;
export type Theme = (typeof THEMES)[number];

export const TOKEN_SCOPES = ['read', 'write'] as const;
export type TokenScope = (typeof TOKEN_SCOPES)[number];

export const RESTRICTIONS = ['none', 'food', 'water', 'food-and-water'] as const;
export type Restriction = (typeof RESTRICTIONS)[number];

export const SPECIES = ['rat', 'mouse', 'other'] as const;
export type Species = (typeof SPECIES)[number];

export const SEXES = ['female', 'male', 'unknown'] as const;
export type Sex = (typeof SEXES)[number];

export const ANIMAL_STATUSES = ['expected', 'in-lab', 'ended'] as const;
export type AnimalStatus = (typeof ANIMAL_STATUSES)[number];

export const BUNDLE_KINDS = ['tetrode', 'stereotrode', 'single-wire', 'shank'] as const;
export type BundleKind = (typeof BUNDLE_KINDS)[number];

export const DEPTH_ZEROS = ['pia', 'dura', 'skull', 'guide-exit'] as const;
export type DepthZero = (typeof DEPTH_ZEROS)[number];

export const BUNDLE_ROLES = [
	'record',
	'reference',
	'field-potential',
	'stimulate',
	'cannula',
	'fibre',
	'fixed',
	'spare'
] as const;
export type BundleRoleName = (typeof BUNDLE_ROLES)[number];

export const SHARP_WAVES = ['positive', 'flat', 'negative'] as const;
export type SharpWave = (typeof SHARP_WAVES)[number];

export const DAY_STATES = ['draft', 'signed', 'countersigned'] as const;
export type DayState = (typeof DAY_STATES)[number];

export const EPOCH_KINDS = ['run', 'rest', 'sleep', 'stimulation', 'excluded'] as const;
export type EpochKind = (typeof EPOCH_KINDS)[number];

export const TALLY_SOURCES = ['by-eye', 'sorting'] as const;
export type TallySource = (typeof TALLY_SOURCES)[number];

export const TALLY_MOMENTS = ['before-move', 'after-move', 'no-move'] as const;
export type TallyMoment = (typeof TALLY_MOMENTS)[number];

export const DATA_KINDS = ['position', 'spikes', 'units', 'epochs'] as const;
export type DataKind = (typeof DATA_KINDS)[number];

export const DATA_FORMATS = ['csv', 'tsv', 'npy'] as const;
export type DataFormat = (typeof DATA_FORMATS)[number];

export const DATA_STATES = ['received', 'taken-in', 'refused'] as const;
export type DataState = (typeof DATA_STATES)[number];

export const UNIT_CLASSES = ['principal', 'interneuron', 'unclear'] as const;
export type UnitClass = (typeof UNIT_CLASSES)[number];

export const ANALYSIS_STATES = ['queued', 'running', 'done', 'failed'] as const;
export type AnalysisState = (typeof ANALYSIS_STATES)[number];

export const EXCLUSION_REASONS = [
	'not-a-unit',
	'mixed-unit',
	'unstable',
	'hardware-fault',
	'tracking-fault',
	'animal-state',
	'wrong-place',
	'protocol-deviation',
	'other'
] as const;
export type ExclusionReason = (typeof EXCLUSION_REASONS)[number];
