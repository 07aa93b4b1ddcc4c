import type { FieldSpec } from './fields';
import { GrowingFloat64, GrowingInt32 } from './growing';
import { LabelTable } from './label-table';

/** A column that is read. */
export interface Column {
	readonly spec: FieldSpec;
	/** Numbers in the product's unit; null for labels. */
	readonly numbers: GrowingFloat64 | null;
	/** Number of each label in `labels`; null for numbers. */
	readonly ids: GrowingInt32 | null;
	readonly labels: LabelTable | null;
}

/** An empty column for a field. */
export function newColumn(spec: FieldSpec): Column {
	return spec.type === 'number'
		? { spec, numbers: new GrowingFloat64(), ids: null, labels: null }
		: { spec, numbers: null, ids: new GrowingInt32(), labels: new LabelTable() };
}
