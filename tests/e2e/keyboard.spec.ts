import type { Locator, Page } from '@playwright/test';
import { choose, field, fill, panel } from './fields';
import { TAG } from './names';
import { expect, personOf, test, visit } from './people';

/** Presses Tab until the place has the focus, as somebody without a mouse would. */
async function tabTo(page: Page, place: Locator, most = 60): Promise<void> {
	for (let presses = 0; presses < most; presses++) {
		await page.keyboard.press('Tab');
		if (await place.evaluate((element) => element === document.activeElement)) return;
	}
	throw new Error(`${most} presses of Tab did not reach ${place}.`);
}

test('signs in, finds an animal and enters a weight without a mouse', async ({ page }) => {
	const { email, password, name } = personOf('experimenter');
	await visit(page, '/sign-in');
	await tabTo(page, page.getByLabel('Mail address'));
	await page.keyboard.type(email);
	await tabTo(page, page.getByLabel('Password'));
	await page.keyboard.type(password);
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/\/$/);
	await expect(page.getByTitle(name)).toBeVisible();

	await page.keyboard.press('Control+k');
	await expect(page.getByRole('combobox', { name: 'Page or animal' })).toBeFocused();
	await page.keyboard.type('r036');
	await expect(page.getByRole('option', { name: 'R036' })).toHaveAttribute('aria-selected', 'true');
	await page.keyboard.press('Enter');
	await expect(page.getByRole('heading', { level: 1, name: 'R036' })).toBeVisible();
	await expect(page.getByRole('combobox', { name: 'Page or animal' })).toBeHidden();

	const weights = panel(page, 'Weights');
	await tabTo(page, field(weights, 'On the scale'), 120);
	await page.keyboard.type('389.5');
	await tabTo(page, field(weights, 'Note'));
	await page.keyboard.type(`By keyboard ${TAG}`);
	await page.keyboard.press('Enter');
	await expect(
		page.getByRole('status').filter({ hasText: 'The weight is entered.' })
	).toBeVisible();
	await expect(weights.getByRole('row').filter({ hasText: `By keyboard ${TAG}` })).toContainText(
		'389.5'
	);
});

test('moves along the day strip by the arrow keys', async ({ open }) => {
	const page = await open({ role: 'observer' });
	await visit(page, '/animals/R031');
	const days = page.getByRole('navigation', { name: 'Days' }).getByRole('link');
	const count = await days.count();
	expect(count).toBeGreaterThan(10);
	await tabTo(page, days.first());
	await page.keyboard.press('End');
	await expect(days.last()).toBeFocused();
	await page.keyboard.press('ArrowRight');
	await expect(days.last()).toBeFocused();
	await page.keyboard.press('ArrowLeft');
	await expect(days.nth(count - 2)).toBeFocused();
	const day = await days.nth(count - 2).getAttribute('data-day');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(new RegExp(`\\?day=${day}$`));
	await expect(days.nth(count - 2)).toHaveAttribute('aria-current', 'date');
});

test('changes the theme by one key and keeps it', async ({ open }) => {
	const page = await open({ role: 'observer' });
	await visit(page, '/animals');
	const root = page.locator('html');
	await expect(root).toHaveAttribute('data-theme', 'bench');
	const kept = page.waitForResponse((answer) => answer.url().endsWith('/theme'));
	await page.keyboard.press('t');
	await expect(root).toHaveAttribute('data-theme', 'evening');
	await kept;
	await page.keyboard.press('t');
	await expect(root).toHaveAttribute('data-theme', 'red');
	await page.waitForLoadState('networkidle');
	await visit(page, '/lab');
	await expect(root).toHaveAttribute('data-theme', 'red');

	// A letter typed into a field is text.
	await page.keyboard.press('/');
	await page.keyboard.type('tt');
	await expect(root).toHaveAttribute('data-theme', 'red');
	await page.keyboard.press('Escape');
	await expect(page.getByRole('combobox', { name: 'Page or animal' })).toBeHidden();
});

test('skips the navigation', async ({ open }) => {
	const page = await open({ role: 'observer' });
	await visit(page, '/animals');
	await page.keyboard.press('Tab');
	const skip = page.getByRole('link', { name: 'Skip to the page' });
	await expect(skip).toBeFocused();
	await expect(skip).toBeInViewport();
	await page.keyboard.press('Enter');
	await page.keyboard.press('Tab');
	await expect(page.getByRole('main').locator(':focus')).toBeVisible();
});

test.describe('without JavaScript', () => {
	test.use({ javaScriptEnabled: false });

	test('one signs in and out, and a wrong password is told', async ({ page }) => {
		const { email, password, name } = personOf('observer');
		await page.goto('/animals');
		await fill(page, { 'Mail address': email, Password: 'not-the-password' });
		await page.getByRole('button', { name: 'Sign in' }).click();
		await expect(page.getByRole('alert')).toContainText('password is not right');
		await expect(page.getByLabel('Mail address')).toHaveValue(email);
		await fill(page, { Password: password });
		await page.getByRole('button', { name: 'Sign in' }).click();
		await expect(page).toHaveURL(/\/animals$/);
		await page.getByTitle(name).click();
		await page.getByRole('button', { name: 'Sign out' }).click();
		await expect(page).toHaveURL(/\/sign-in/);
	});

	test('a new animal is entered, after its mistakes are shown beside their fields', async ({
		open
	}) => {
		const page = await open({ role: 'experimenter', javaScriptEnabled: false });
		const code = `NOJS${TAG}`;
		await page.goto('/animals/new');
		await fill(page, { Code: 'not a code', Strain: 'Wistar', 'Baseline weight': '311.5' });
		await choose(page, 'Sex', 'female');
		await page.getByRole('button', { name: 'Enter animal' }).click();
		await expect(field(page, 'Code')).toHaveAttribute('aria-invalid', 'true');
		await expect(page.getByText('A code has up to 24 letters')).toBeVisible();
		await expect(field(page, 'Strain')).toHaveValue('Wistar');
		await field(page, 'Code').fill(code);
		await page.getByRole('button', { name: 'Enter animal' }).click();
		await expect(page).toHaveURL(new RegExp(`/animals/${code}$`));
		await expect(page.getByRole('heading', { level: 1, name: code })).toBeVisible();
	});
});
