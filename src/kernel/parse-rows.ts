const LF: u32 = 10;
const CR: u32 = 13;
const SPACE: u32 = 32;
const QUOTE: u32 = 34;
const PLUS: u32 = 43;
const MINUS: u32 = 45;
const ZERO: u32 = 48;
/** Whole numbers up to here are exact, and so is their division by an exact power of ten. */
const EXACT: i64 = 9007199254740992;
/** More digits might overflow. */
const MOST_DIGITS: i32 = 18;
const MOST_DECIMALS: i32 = 22;

/** What a cell holds; a plan has one entry of 32 bytes a cell: kind, out, table, –, factor, divisor. */
const NUMBER: i32 = 1;
const LABEL: i32 = 2;
const ENTRY: usize = 32;

/** Slots of a table of labels: two words of text, the label's number and one. */
const SLOT: usize = 24;
const SLOTS: u32 = 65536;

/** Slot of a label, its own or the empty one where it would stand. */
function slotOf(table: usize, low: u64, high: u64): usize {
	const mixed = (low ^ (high * 0xc2b2ae3d27d4eb4f)) * 0x9e3779b97f4a7c15;
	let slot = <u32>(mixed >> 48);
	while (true) {
		const at = table + <usize>slot * SLOT;
		if (load<i32>(at, 16) === 0) return at;
		if (load<u64>(at) === low && load<u64>(at, 8) === high) return at;
		slot = (slot + 1) & (SLOTS - 1);
	}
}

/** Makes a label known. @param text up to 16 bytes, filled up with zeros */
export function addLabel(table: usize, text: usize, id: i32): void {
	const low = load<u64>(text);
	const high = load<u64>(text, 8);
	const at = slotOf(table, low, high);
	store<u64>(at, low);
	store<u64>(at, high, 8);
	store<i32>(at, id + 1, 16);
}

/**
 * Reads rows of a delimited table as long as they are written plainly: numbers of digits with one
 * decimal mark, labels that are known. Stops before the first row that is not, for somebody else to
 * read.
 * @param from, end  whole rows, each ended by a line feed
 * @param tens       float64, powers of ten
 * @param told       gets two int32: rows read, and where it stopped
 */
export function parseRows(
	from: usize,
	end: usize,
	plan: usize,
	cells: i32,
	delimiter: u32,
	mark: u32,
	tens: usize,
	told: usize
): void {
	const lastCell = plan + <usize>(cells - 1) * ENTRY;
	let rows: usize = 0;
	let row = from;
	while (row < end) {
		let at = row;
		let isPlain = true;
		for (let cell = plan; cell <= lastCell; cell += ENTRY) {
			const kind = load<i32>(cell);
			let c = <u32>load<u8>(at);
			while (c === SPACE) c = <u32>load<u8>(++at);
			if (kind === NUMBER) {
				const sign = c;
				if (sign === MINUS || sign === PLUS) c = <u32>load<u8>(++at);
				const first = at;
				let mantissa: i64 = 0;
				let digit = c - ZERO;
				while (digit <= 9) {
					mantissa = mantissa * 10 + <i64>digit;
					c = <u32>load<u8>(++at);
					digit = c - ZERO;
				}
				let digits = <i32>(at - first);
				let decimals = 0;
				if (c === mark) {
					const begin = ++at;
					c = <u32>load<u8>(at);
					digit = c - ZERO;
					while (digit <= 9) {
						mantissa = mantissa * 10 + <i64>digit;
						c = <u32>load<u8>(++at);
						digit = c - ZERO;
					}
					decimals = <i32>(at - begin);
					digits += decimals;
				}
				while (c === SPACE) c = <u32>load<u8>(++at);
				if (digits === 0 || digits > MOST_DIGITS || decimals > MOST_DECIMALS) isPlain = false;
				if (mantissa >= EXACT) isPlain = false;
				if (!isPlain) break;
				let value = <f64>mantissa / load<f64>(tens + ((<usize>decimals) << 3));
				if (sign === MINUS) value = -value;
				value = (value * load<f64>(cell, 16)) / load<f64>(cell, 24);
				store<f64>(<usize>load<i32>(cell, 4) + (rows << 3), value);
			} else {
				let low: u64 = 0;
				let high: u64 = 0;
				let length: u64 = 0;
				let before: u32 = SPACE;
				while (c !== delimiter && c !== LF && c !== CR) {
					if (c === QUOTE || c === 0) isPlain = false;
					if (length < 8) low |= (<u64>c) << (length << 3);
					else if (length < 16) high |= (<u64>c) << ((length - 8) << 3);
					length++;
					before = c;
					c = <u32>load<u8>(++at);
				}
				if (kind === LABEL) {
					if (length > 16 || before === SPACE) isPlain = false;
					if (!isPlain) break;
					const known = load<i32>(slotOf(<usize>load<i32>(cell, 8), low, high), 16);
					if (known === 0) isPlain = false;
					store<i32>(<usize>load<i32>(cell, 4) + (rows << 2), known - 1);
				}
				if (!isPlain) break;
			}
			if (cell === lastCell) {
				if (c === CR) c = <u32>load<u8>(++at);
				if (c !== LF) isPlain = false;
			} else if (c !== delimiter) {
				isPlain = false;
			}
			if (!isPlain) break;
			at++;
		}
		if (!isPlain) break;
		row = at;
		rows++;
	}
	store<i32>(told, <i32>rows);
	store<i32>(told, <i32>row, 4);
}
