interface ErrorWords {
	title: string;
	/** What is safe and what to do. */
	safe: string;
}

const known: Record<number, ErrorWords> = {
	401: { title: 'Please sign in', safe: 'Nothing was changed. Sign in and open the page again.' },
	403: {
		title: 'Not for your roles',
		safe: 'Nothing was changed. A PI or an admin can change what you may do.'
	},
	404: {
		title: 'Not found',
		safe: 'The record is untouched. The address may be mistyped, or the page is not for you to see.'
	},
	409: {
		title: 'Somebody was quicker',
		safe: 'Nothing was overwritten. Go back, load the page again and repeat your change.'
	},
	410: {
		title: 'This address opens nothing now',
		safe: 'Nothing was changed. Each such address works once and for a limited time.'
	},
	413: { title: 'Too large', safe: 'Nothing was kept of it. Send a smaller file.' },
	429: { title: 'Too many tries', safe: 'Nothing was changed. Wait a minute and try again.' },
	503: {
		title: 'Not ready',
		safe: 'What was saved is safe. Wait a moment and load the page again.'
	}
};

/** Title and reassurance for an HTTP status; unknown ones count as faults of ours. */
export function errorWords(status: number): ErrorWords {
	return (
		known[status] ?? {
			title: status < 500 ? 'That did not work' : 'Something broke on our side',
			safe: 'Each change is saved whole or not at all, so the record is as it was before. Go back and try once more.'
		}
	);
}
