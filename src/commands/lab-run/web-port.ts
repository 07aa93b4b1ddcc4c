import { Refusal } from '../bootstrap/refusal.mjs';
import { firstFreePort, isPortFree } from '../machine/ports';

const USUAL_PORT = 5173;

/** The port asked for, or else the first free one from the usual one upward. */
export async function webPort(env: NodeJS.ProcessEnv): Promise<number> {
	if (!env.PORT) return firstFreePort(USUAL_PORT);
	const port = Number(env.PORT);
	if (!Number.isInteger(port) || port < 1 || port > 65_535) {
		throw new Refusal(`PORT is "${env.PORT}", which is no port (1 to 65535). Nothing was started.`);
	}
	if (!(await isPortFree(port))) {
		throw new Refusal(
			`Port ${port} is in use by another program. Nothing was started. Set PORT to a free one, or leave it out to take the first free one from ${USUAL_PORT}.`
		);
	}
	return port;
}
