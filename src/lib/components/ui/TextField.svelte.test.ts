import { render, screen } from '@testing-library/svelte';
import { expect, test } from 'vitest';
import NumberField from './NumberField.svelte';
import SelectField from './SelectField.svelte';
import TextField from './TextField.svelte';

/** What a screen reader says after the label. */
function described(control: HTMLElement): string {
	return (control.getAttribute('aria-describedby') ?? '')
		.split(' ')
		.map((id) => document.getElementById(id)?.textContent?.trim() ?? `nothing has id ${id}`)
		.join(' | ');
}

test('hint and error are tied to the control they belong to', () => {
	render(TextField, {
		name: 'code',
		label: 'Code',
		hint: 'Unique in the lab.',
		errors: ['Letters and digits only.', 'At most 8.']
	});
	const input = screen.getByLabelText(/^Code/);
	expect(described(input)).toBe('Unique in the lab. | Letters and digits only. At most 8.');
	expect(input.getAttribute('aria-invalid')).toBe('true');
	expect(input.getAttribute('name')).toBe('code');
});

test('without a hint or an error nothing is promised', () => {
	render(TextField, { name: 'code', label: 'Code', errors: [] });
	const input = screen.getByLabelText('Code');
	expect(input.hasAttribute('aria-describedby')).toBe(false);
	expect(input.hasAttribute('aria-invalid')).toBe(false);
});

test('the unit is part of the label, and zero is a value', () => {
	render(NumberField, { name: 'weightG', label: 'Weight', unit: 'g', value: 0 });
	expect(screen.getByLabelText<HTMLInputElement>('Weight, g').value).toBe('0');
});

test('a choice that has not been made shows the empty line', () => {
	render(SelectField, {
		name: 'sex',
		label: 'Sex',
		value: '',
		emptyLabel: 'Not recorded',
		options: [{ value: 'male', label: 'Male' }]
	});
	const select = screen.getByLabelText<HTMLSelectElement>('Sex');
	expect(select.selectedOptions[0].textContent).toBe('Not recorded');
});
