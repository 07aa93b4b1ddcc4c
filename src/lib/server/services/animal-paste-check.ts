import type { PastedAnimal, PastedAnimals } from '$lib/schemas/animal-paste';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { Project } from '$lib/server/models/project';
import { Protocol } from '$lib/server/models/protocol';
import { takenCodes } from './animal-intake';
import { placeRefusal } from './protocol-places';

/** Adds to a pasted list what only the record knows: codes taken, protocols full or expired. */
export async function checkPaste(pasted: PastedAnimals, today: string): Promise<PastedAnimals> {
	const readable = pasted.rows.filter((row) => row.animal !== null);
	const codes = readable.flatMap((row) => row.animal?.code ?? []);
	const [taken, protocols, projects] = await Promise.all([
		takenCodes(codes),
		Protocol.findAll({ where: { withdrawnAt: null } }),
		Project.findAll({ where: { withdrawnAt: null }, attributes: ['name'] })
	]);
	const used = await AnimalProtocol.countEver(protocols.map((protocol) => protocol.id));
	const projectNames = new Set(projects.map((project) => project.name.toLowerCase()));

	const issuesOf = ({ animal }: PastedAnimal) => {
		const issues: PastedAnimal['issues'] = [];
		if (!animal) return issues;
		if (taken.has(animal.code.toUpperCase())) {
			const message = `${animal.code} is taken. Codes are used once, also after the end.`;
			issues.push({ column: 'code', message });
		}
		if (animal.project && !projectNames.has(animal.project.toLowerCase())) {
			issues.push({ column: 'project', message: `No project “${animal.project}” is in use.` });
		}
		if (!animal.protocol) return issues;
		const protocol = protocols.find(({ number }) => number === animal.protocol);
		if (!protocol) {
			issues.push({ column: 'protocol', message: `No protocol ${animal.protocol} is in use.` });
			return issues;
		}
		const count = used.get(protocol.id) ?? 0;
		const stay = { from: animal.memberSince ?? today, until: null };
		const refusal = placeRefusal(protocol, count, stay, today);
		if (refusal) issues.push({ column: 'protocol', message: refusal.message });
		// The next line finds one place fewer.
		else used.set(protocol.id, count + 1);
		return issues;
	};
	return {
		...pasted,
		rows: pasted.rows.map((row) => ({ ...row, issues: [...row.issues, ...issuesOf(row)] }))
	};
}
