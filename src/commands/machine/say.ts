/** A line for the person at the terminal. Standard output stays free for a command's result. */
export function say(text: string): void {
	process.stderr.write(`${text}\n`);
}
