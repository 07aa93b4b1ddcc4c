let read: () => Date = () => new Date();

/** The one clock of the server. Everything that asks the time asks here. */
export function now(): Date {
	return read();
}

/** Lets a test hold or move time; returns the way back. */
export function setClock(next: () => Date): () => void {
	const before = read;
	read = next;
	return () => {
		read = before;
	};
}
