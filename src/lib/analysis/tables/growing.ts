/** Float64 numbers of unknown count; `reserve` before writing past `values.length`. */
export class GrowingFloat64 {
	values = new Float64Array(1024);

	reserve(length: number): void {
		if (length <= this.values.length) return;
		const larger = new Float64Array(Math.max(length, 2 * this.values.length));
		larger.set(this.values);
		this.values = larger;
	}
}

/** Int32 numbers of unknown count; `reserve` before writing past `values.length`. */
export class GrowingInt32 {
	values = new Int32Array(1024);

	reserve(length: number): void {
		if (length <= this.values.length) return;
		const larger = new Int32Array(Math.max(length, 2 * this.values.length));
		larger.set(this.values);
		this.values = larger;
	}
}
