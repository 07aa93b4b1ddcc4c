/** States of a bundle, with the words and the colour that go with each shape. */
export const stateLooks = {
	hold: { label: 'Hold', colour: 'text-hold' },
	settling: { label: 'Settling', colour: 'text-hold' },
	watch: { label: 'Watch', colour: 'text-watch' },
	advance: { label: 'Advance', colour: 'text-advance' },
	'no-travel': { label: 'No travel', colour: 'text-parked' },
	'too-few-days': { label: 'Too few days', colour: 'text-soft' },
	parked: { label: 'Parked', colour: 'text-parked' }
} as const;

export type AdviceState = keyof typeof stateLooks;
