/**
 * @typedef {{ version?: string, integrity?: string, optional?: boolean, devOptional?: boolean, peer?: boolean, link?: boolean, inBundle?: boolean }} LockedPackage
 * @typedef {{ packages?: Record<string, LockedPackage> }} LockFile
 */

/**
 * Whether npm's record of an installed tree holds what the lock file asks for.
 * Optional packages may be absent (they are for other systems); nothing may differ or be extra.
 *
 * @param {LockFile} lock
 * @param {LockFile} installed
 */
export function matchesLock(lock, installed) {
	const wanted = lock.packages ?? {};
	const present = installed.packages ?? {};
	for (const [path, entry] of Object.entries(wanted)) {
		if (path === '') continue;
		const found = present[path];
		if (!found && !entry.optional && !entry.devOptional) return false;
		if (found && found.version !== entry.version) return false;
		if (found?.integrity && entry.integrity && found.integrity !== entry.integrity) return false;
	}
	return Object.keys(present).every((path) => path === '' || path in wanted);
}
