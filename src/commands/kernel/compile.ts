import asc from 'assemblyscript/asc';
import { join } from 'node:path';
import { CHECKOUT } from '../home/home';

const SOURCE = 'src/kernel/index.ts';
const OPTIONS = ['-O3', '--noAssert', '--runtime', 'stub', '--enable', 'simd'];

/**
 * Compiles `src/kernel` to WebAssembly with 128-bit vectors.
 * @throws Error with the compiler's words
 */
export async function compileKernel(): Promise<Uint8Array> {
	let binary: Uint8Array | null = null;
	const { error, stderr } = await asc.main(
		[SOURCE, '--baseDir', CHECKOUT, '--outFile', 'kernel.wasm', ...OPTIONS],
		{
			writeFile: (_name, contents) => {
				if (typeof contents !== 'string') binary = contents;
			}
		}
	);
	if (error || !binary) throw new Error(`${error?.message ?? 'no output'}\n${stderr.toString()}`);
	return binary;
}

/** The module that holds the compiled kernel. */
export const KERNEL_MODULE = join(CHECKOUT, 'src/lib/analysis/kernel/kernel-bytes.ts');

/** Text of that module. */
export function kernelModule(binary: Uint8Array): string {
	const lines =
		Buffer.from(binary)
			.toString('base64')
			.match(/.{1,100}/g) ?? [];
	return [
		'// Compiled from src/kernel by `npm run kernel`; not to be changed by hand.',
		'export const KERNEL_BASE64 = [',
		lines.map((line) => `\t'${line}'`).join(',\n'),
		"].join('');",
		''
	].join('\n');
}
