import type { Locator, Page } from '@playwright/test';

/** A field by its label, whatever unit or "(needed)" stands behind it. */
export function field(place: Page | Locator, label: string): Locator {
	const start = label.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
	const named = place.getByLabel(new RegExp(`^\\s*${start}\\s*(,|\\(|$)`));
	// A panel may have the same name.
	return named.and(place.locator('input, select, textarea'));
}

/** Fills fields by their labels. */
export async function fill(place: Page | Locator, values: Record<string, string>): Promise<void> {
	for (const [label, value] of Object.entries(values)) await field(place, label).fill(value);
}

/** Chooses in a list by the beginning of what a choice says. */
export async function choose(place: Page | Locator, label: string, choice: string): Promise<void> {
	const list = field(place, label);
	const option = list.getByRole('option').filter({ hasText: choice }).first();
	await list.selectOption((await option.textContent())?.trim() ?? choice);
}

/** A panel or other named region of the page. */
export function panel(page: Page, name: string): Locator {
	return page.getByRole('region', { name, exact: true });
}
