import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { db } from '$lib/server/db';
import { TooMany } from '$lib/server/errors';
import { hashSecret } from './secret';

interface Allowance {
	tries: number;
	withinS: number;
}

/**
 * A lab's people often share one network address, so an address is allowed more than an account.
 * An account's limit is counted for addresses nobody has, too: a limit must not tell who is a member.
 */
const ALLOWANCES = {
	'sign-in-account': { tries: 10, withinS: 15 * 60 },
	'sign-in-address': { tries: 60, withinS: 15 * 60 },
	'reset-account': { tries: 3, withinS: 60 * 60 },
	'reset-address': { tries: 20, withinS: 60 * 60 },
	'link-address': { tries: 60, withinS: 15 * 60 },
	'password-account': { tries: 10, withinS: 15 * 60 },
	// A loop over a day's files is far below this; a script gone wild is above it at once.
	'api-token': { tries: 1200, withinS: 60 }
} as const satisfies Record<string, Allowance>;

export type LimitName = keyof typeof ALLOWANCES;

function limiter(name: LimitName): RateLimiterPostgres {
	const { tries, withinS } = ALLOWANCES[name];
	return new RateLimiterPostgres({
		storeClient: db(),
		storeType: 'sequelize',
		tableName: 'rate_limit',
		tableCreated: true,
		clearExpiredByTimeout: false,
		keyPrefix: name,
		points: tries,
		duration: withinS
	});
}

/** Counts one try. @throws TooMany, saying how long to wait, once the allowance is used up. */
export async function takeTry(name: LimitName, who: string): Promise<void> {
	try {
		await limiter(name).consume(hashSecret(who));
	} catch (fault) {
		if (fault instanceof RateLimiterRes) {
			throw new TooMany(Math.max(1, Math.ceil(fault.msBeforeNext / 1000)));
		}
		throw fault;
	}
}

/** The tries so far are forgiven: the person has shown who they are. */
export async function forgive(name: LimitName, who: string): Promise<void> {
	await limiter(name).delete(hashSecret(who));
}

/** Takes back one try, for a limit that many people share. */
export async function giveBackTry(name: LimitName, who: string): Promise<void> {
	await limiter(name).reward(hashSecret(who), 1);
}

/** Rows past their time count for nothing; they are cleared so that the table stays small. */
export async function clearOldTries(): Promise<void> {
	await db().query('DELETE FROM rate_limit WHERE expire < $at', { bind: { at: Date.now() } });
}
