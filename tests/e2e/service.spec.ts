import { expect, test } from '@playwright/test';

test('the service says that all its parts are well', async ({ request }) => {
	const answer = await request.get('/api/health');
	expect(answer.status()).toBe(200);
	expect(await answer.json()).toMatchObject({
		ok: true,
		database: 'ok',
		storage: 'ok',
		queue: 'ok'
	});
});

test('a stranger is led to the sign-in page', async ({ page }) => {
	await page.goto('/');
	await expect(page).toHaveURL(/\/sign-in/);
	await expect(page.getByRole('button', { name: /sign in/i })).toBeVisible();
});
