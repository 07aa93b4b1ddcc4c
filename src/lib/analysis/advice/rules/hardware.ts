import { verdict, type Rule, type Ruling } from './rule';

/**
 * 2. Broken channels come before lost cells: half of a bundle's channels (a quarter of a shank's) open
 * or short in a reading from inside the brain. Values from plating are never compared: impedances
 * shift after implantation.
 */
export const hardware: Rule = {
	number: 2,
	name: 'hardware',
	apply({ bundle, asking, parameters }): Ruling {
		const { shortBelowKohm, openAboveKohm, impedanceDays, shankBadShare } = parameters;
		const reading = bundle.impedances.findLast(
			({ isInBrain, atH }) =>
				isInBrain && atH <= asking.atH && asking.atH - atH <= impedanceDays * 24
		);
		if (!reading) return { inputs: { channels: null, bad: null }, verdict: null };
		const channels = reading.kohm.length;
		const bad = reading.kohm.filter(
			(kohm) => kohm !== null && (kohm < shortBelowKohm || kohm > openAboveKohm)
		).length;
		const share = bundle.kind === 'shank' ? shankBadShare : 0.5;
		const isBroken = bad > 0 && bad >= share * channels;
		return {
			inputs: { channels, bad, share, readAtH: reading.atH },
			verdict: isBroken ? verdict('hold', 'check-hardware', 'impedance') : null
		};
	}
};
