import type { UnitRow } from '../tables/units-table';
import type { UnitInput } from './input';

/**
 * Units with the bundle a table of units names, where the spikes name none. A label that the table
 * lists in more than one bundle stays without.
 */
export function withBundles(units: readonly UnitInput[], rows: readonly UnitRow[]): UnitInput[] {
	return units.map((unit) => {
		if (unit.bundle !== null) return unit;
		const listed = rows.filter((row) => row.unit === unit.unit);
		return { ...unit, bundle: listed.length === 1 ? listed[0].bundle : null };
	});
}
