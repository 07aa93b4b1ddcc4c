import type { UnitRow } from '$lib/analysis/tables/units-table';
import { Conflict } from '$lib/server/errors';
import { Unit } from '$lib/server/models/unit';
import type { Write } from '$lib/server/record';
import { bundleIds, currentOf } from './sortings';

/**
 * Adds class, amplitude and noise from a units table to the session's current sorting, and the
 * bundle where the spikes named none.
 * @returns sentences for rows that fit no unit and units that no row names, and whether a unit was
 * given a bundle: that alone changes what an analysis says
 */
export async function putUnitFacts(
	w: Write,
	sessionId: string,
	rows: readonly UnitRow[]
): Promise<{ warnings: string[]; hasPlaced: boolean }> {
	const sortingId = await currentOf(sessionId, w.t);
	if (!sortingId) throw new Conflict('no-sorting', 'Take in the spikes first.');
	const units = await Unit.findAll({
		where: { sortingId },
		attributes: ['id', 'label', 'bundleLabel'],
		transaction: w.t
	});
	const bundles = await bundleIds(sortingId, w.t);
	const named = new Set<string>();
	const strangers: string[] = [];
	let hasPlaced = false;
	for (const row of rows) {
		const fits = units.filter(
			({ label, bundleLabel }) =>
				label === row.unit &&
				(row.bundle === null || bundleLabel === null || bundleLabel === row.bundle)
		);
		if (fits.length === 0) strangers.push(row.unit);
		for (const unit of fits) {
			named.add(unit.id);
			const { class: unitClass, amplitudeUv, noiseUv } = row;
			const isOnlyPlace = rows.filter((other) => other.unit === row.unit).length === 1;
			const bundle = unit.bundleLabel ?? (isOnlyPlace ? row.bundle : null);
			hasPlaced ||= bundle !== unit.bundleLabel;
			await unit.update(
				{
					class: unitClass,
					amplitudeUv,
					noiseUv,
					bundleLabel: bundle,
					bundleId: (bundle && bundles.get(bundle.toLowerCase())) ?? null
				},
				{ transaction: w.t }
			);
		}
	}
	const silent = units.filter(({ id }) => !named.has(id)).map(({ label }) => label);
	const warnings = [
		...(strangers.length > 0
			? [
					`The current sorting has no such unit, so these rows were left out: ${strangers.join(', ')}.`
				]
			: []),
		...(silent.length > 0 ? [`Nothing is said of units ${silent.join(', ')}.`] : [])
	];
	return { warnings, hasPlaced };
}
