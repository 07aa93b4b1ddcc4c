import { readFile } from 'node:fs/promises';
import { expect, it } from 'vitest';
import { compileKernel, KERNEL_MODULE, kernelModule } from '../../../commands/kernel/compile';

it('holds what src/kernel compiles to; `npm run kernel` writes it anew', async () => {
	expect(await readFile(KERNEL_MODULE, 'utf8')).toBe(kernelModule(await compileKernel()));
});
