import { writeFile } from 'node:fs/promises';
import { relative } from 'node:path';
import { CHECKOUT } from './home/home';
import { compileKernel, KERNEL_MODULE, kernelModule } from './kernel/compile';

/** `npm run kernel`: compiles src/kernel into the module the analysis loads. */
export default async function kernel(): Promise<number> {
	const binary = await compileKernel();
	await writeFile(KERNEL_MODULE, kernelModule(binary));
	console.log(`${relative(CHECKOUT, KERNEL_MODULE)}: ${binary.length} bytes`);
	return 0;
}
