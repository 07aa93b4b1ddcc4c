/** A table as a spreadsheet puts it on the clipboard, or as somebody types it. */
export interface PastedTable {
	separator: '\t' | ';' | ',';
	/** Cells by line, trimmed; lines without any text are left out. */
	lines: { number: number; cells: string[] }[];
}

/**
 * Splits pasted text into cells. The separator is the one the first line has, tab before semicolon
 * before comma, so that decimal commas survive wherever a stronger separator is there. A cell in
 * double quotes may hold separators, line breaks and doubled quotes.
 */
export function readPastedTable(text: string): PastedTable {
	const first = text.split(/\r?\n/).find((line) => line.trim() !== '') ?? '';
	const separator = first.includes('\t') ? '\t' : first.includes(';') ? ';' : ',';
	const lines: PastedTable['lines'] = [];
	let cells: string[] = [];
	let cell = '';
	let isQuoted = false;
	let number = 1;
	let startsAt = 1;

	const endCell = () => {
		cells.push(cell.trim());
		cell = '';
	};
	const endLine = () => {
		endCell();
		if (cells.some((text) => text !== '')) lines.push({ number: startsAt, cells });
		cells = [];
	};

	for (let i = 0; i < text.length; i++) {
		const letter = text[i];
		if (letter === '\n') number++;
		if (isQuoted) {
			if (letter !== '"') cell += letter;
			else if (text[i + 1] === '"') cell += text[i++];
			else isQuoted = false;
		} else if (letter === '"' && cell.trim() === '') {
			isQuoted = true;
			cell = '';
		} else if (letter === separator) endCell();
		else if (letter === '\n') {
			endLine();
			startsAt = number;
		} else if (letter !== '\r') cell += letter;
	}
	endLine();
	return { separator, lines };
}
