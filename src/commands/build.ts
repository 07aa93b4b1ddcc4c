import { relative } from 'node:path';
import { ensureBuild } from './bundle/ensure-build';
import { CHECKOUT } from './home/home';

/** `npm run build`: the built application of the sources as they are; prints its folder. */
export default async function build(): Promise<number> {
	console.log(relative(CHECKOUT, await ensureBuild()));
	return 0;
}
