import { say } from '../machine/say';

/** npm hands Ctrl-C on to us although the terminal has sent it already; such an echo is no second wish. */
const ECHO_MS = 700;

export interface StopSignals {
	/** Settles when a person or the system asks us to stop. */
	asked: Promise<void>;
	isAsked(): boolean;
}

/** The first signal asks for an orderly stop; a later one calls `onImpatience`. */
export function listenForStop(onImpatience: () => void): StopSignals {
	let askedAt: number | undefined;
	const asked = new Promise<void>((resolve) => {
		const onSignal = () => {
			if (askedAt === undefined) {
				askedAt = Date.now();
				say('Stopping …');
				resolve();
			} else if (Date.now() - askedAt > ECHO_MS) {
				onImpatience();
			}
		};
		for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, onSignal);
	});
	return { asked, isAsked: () => askedAt !== undefined };
}
