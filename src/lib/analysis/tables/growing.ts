/** Float64 numbers of unknown count; `reserve` before writing past `values.length`. */
export class GrowingFloat64 {
	values = new Float64Array(1024);

	reserve(length: number): void {
		if (length <= this.values.length) return;
		const larger = new Float64Array(Math.max(length, Math.ceil(1.5 * this.values.length)));
		larger.set(this.values);
		this.values = larger;
	}

	/** The first `length` numbers; copied only where much room would be held for nothing. */
	first(length: number): Float64Array {
		const isTight = this.values.length <= 1.5 * length;
		return isTight ? this.values.subarray(0, length) : this.values.slice(0, length);
	}
}

/** Int32 numbers of unknown count; `reserve` before writing past `values.length`. */
export class GrowingInt32 {
	values = new Int32Array(1024);

	reserve(length: number): void {
		if (length <= this.values.length) return;
		const larger = new Int32Array(Math.max(length, Math.ceil(1.5 * this.values.length)));
		larger.set(this.values);
		this.values = larger;
	}
}
