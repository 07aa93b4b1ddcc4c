import { KERNEL_BASE64 } from './kernel-bytes';

type KernelFunction = (...numbers: number[]) => void;

/** What `src/kernel` exports; pointers are byte offsets into `memory`. */
interface KernelExports {
	readonly memory: WebAssembly.Memory;
	readonly smoothedShifts: KernelFunction;
	readonly rawShifts: KernelFunction;
	readonly addLabel: KernelFunction;
	readonly evidence: KernelFunction;
	readonly parseRows: KernelFunction;
	readonly smoothFour: KernelFunction;
	readonly smoothGrid: KernelFunction;
	readonly tileRates: KernelFunction;
	readonly tileBounds: KernelFunction;
	readonly tiledDecode: KernelFunction;
}

const PAGE = 65_536;
/** Rooms begin at whole cache lines. */
const LINE = 64;

/**
 * The compiled kernel with a memory of its own. Pure: it reads and writes nothing but that memory.
 * Take all room first; growing the memory makes earlier views useless.
 */
export class Kernel {
	private used = LINE;

	constructor(readonly call: KernelExports) {}

	/** Room for `bytes`, zero unless the kernel was cleared. @returns its offset */
	take(bytes: number): number {
		const at = this.used;
		this.used = Math.ceil((at + bytes) / LINE) * LINE;
		const missing = this.used - this.call.memory.buffer.byteLength;
		if (missing > 0) this.call.memory.grow(Math.ceil(missing / PAGE));
		return at;
	}

	/** Room that holds the numbers. */
	keep(numbers: Float64Array | Float32Array | Int32Array | Uint16Array): number {
		const at = this.take(numbers.byteLength);
		const from = new Uint8Array(numbers.buffer, numbers.byteOffset, numbers.byteLength);
		new Uint8Array(this.call.memory.buffer).set(from, at);
		return at;
	}

	/** Forgets all rooms; rooms taken next are not zero. */
	clear(): void {
		this.used = LINE;
	}

	bytes(at: number, length: number): Uint8Array {
		return new Uint8Array(this.call.memory.buffer, at, length);
	}

	float64(at: number, length: number): Float64Array {
		return new Float64Array(this.call.memory.buffer, at, length);
	}

	float32(at: number, length: number): Float32Array {
		return new Float32Array(this.call.memory.buffer, at, length);
	}

	int32(at: number, length: number): Int32Array {
		return new Int32Array(this.call.memory.buffer, at, length);
	}
}

let compiled: WebAssembly.Module | null | undefined;

/** A kernel of its own for each caller; null where the machine has no WebAssembly with vectors. */
export function newKernel(): Kernel | null {
	compiled ??= compiledModule();
	if (!compiled) return null;
	const { exports } = new WebAssembly.Instance(compiled);
	return new Kernel(exports as unknown as KernelExports);
}

let scratch: Kernel | null | undefined;

/**
 * A kernel for work that is over when the function that asked for it returns: it comes cleared, and
 * whatever it held is lost to the next who asks. Spares a memory for every small piece of work.
 */
export function scratchKernel(): Kernel | null {
	scratch ??= newKernel();
	scratch?.clear();
	return scratch;
}

function compiledModule(): WebAssembly.Module | null {
	if (typeof WebAssembly === 'undefined') return null;
	const bytes = Uint8Array.from(atob(KERNEL_BASE64), (letter) => letter.charCodeAt(0));
	return WebAssembly.validate(bytes) ? new WebAssembly.Module(bytes) : null;
}
