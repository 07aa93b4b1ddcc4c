import { execFileSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { mirrorOf, parseAptSources } from './apt-sources';

/** How this machine reaches its package sources; read when the proof runs, kept nowhere. */
export interface MachineSettings {
	release: string;
	mirror: string;
	/** Files that a fresh system on this network needs as well. */
	files: string[];
	env: Record<string, string>;
}

const APT = '/etc/apt';

export function machineSettings(): MachineSettings {
	const release = /^VERSION_CODENAME=(.*)$/m.exec(readFileSync('/etc/os-release', 'utf8'))?.[1];
	if (!release) throw new Error('This system does not tell its release in /etc/os-release');
	const sourceFiles = [
		join(APT, 'sources.list'),
		...list(join(APT, 'sources.list.d')).filter((file) => /\.(list|sources)$/.test(file))
	].filter(existsSync);
	const debian = sourceFiles.filter((file) => mirrorOf(release, read(file)));
	const mirror = mirrorOf(release, debian.flatMap(read));
	if (!mirror) throw new Error(`None of apt's sources here serves ${release}`);

	const npm = (key: string) =>
		execFileSync('npm', ['config', 'get', key], { encoding: 'utf8' }).trim();
	const caFile = npm('cafile');
	const proxies = list(join(APT, 'apt.conf.d')).filter((file) =>
		/proxy/i.test(readFileSync(file, 'utf8'))
	);
	const caFiles = [caFile, process.env.NODE_EXTRA_CA_CERTS ?? ''].filter((file) =>
		existsSync(file)
	);
	return {
		release,
		mirror,
		files: [...debian, ...proxies, ...caFiles, '/etc/resolv.conf', '/etc/hosts'],
		env: {
			npm_config_registry: npm('registry'),
			...(existsSync(caFile) ? { npm_config_cafile: caFile } : {}),
			...pick(/^(NODE_EXTRA_CA_CERTS|https?_proxy|no_proxy)$/i)
		}
	};
}

function read(file: string) {
	return parseAptSources(readFileSync(file, 'utf8'));
}

function list(folder: string): string[] {
	return existsSync(folder) ? readdirSync(folder).map((name) => join(folder, name)) : [];
}

function pick(names: RegExp): Record<string, string> {
	return Object.fromEntries(
		Object.entries(process.env).flatMap(([name, value]) =>
			names.test(name) && value ? [[name, value]] : []
		)
	);
}
