import { ROLE_NAMES, type Role } from '$lib/schemas/roles';

export interface Letter {
	subject: string;
	text: string;
}

const lines = (...paragraphs: string[]) => `${paragraphs.join('\n\n')}\n`;

export function invitationLetter(invited: {
	labName: string;
	name: string;
	roles: Role[];
	by: string;
	link: string;
	days: number;
}): Letter {
	const roles = invited.roles.map((role) => ROLE_NAMES[role]).join(', ');
	return {
		subject: `Invitation to ${invited.labName}`,
		text: lines(
			`Dear ${invited.name},`,
			`${invited.by} invites you to the notebook of ${invited.labName} as: ${roles}.`,
			`Open this address and choose a password. It works once, for ${invited.days} days:\n${invited.link}`,
			'If you do not expect this, do nothing; no account is made.'
		)
	};
}

export function welcomeLetter(added: {
	labName: string;
	name: string;
	link: string;
	days: number;
}): Letter {
	return {
		subject: `Your place in ${added.labName}`,
		text: lines(
			`Dear ${added.name},`,
			`You were added to the notebook of ${added.labName}.`,
			`Open this address and choose a password. It works once, for ${added.days} days:\n${added.link}`
		)
	};
}

export function resetLetter(asked: { labName: string; name: string; link: string }): Letter {
	return {
		subject: `New password for ${asked.labName}`,
		text: lines(
			`Dear ${asked.name},`,
			`Somebody, perhaps you, asked for a new password for the notebook of ${asked.labName}.`,
			`Open this address and choose one. It works once, for one hour:\n${asked.link}`,
			'If it was not you, do nothing; your password stays as it is.'
		)
	};
}

export function passwordChangedLetter(changed: { labName: string; name: string }): Letter {
	return {
		subject: `Your password for ${changed.labName} was changed`,
		text: lines(
			`Dear ${changed.name},`,
			`The password of your account in the notebook of ${changed.labName} was changed, and browsers signed in before were signed out.`,
			'If it was not you, tell a PI of the lab at once: they can deactivate the account.'
		)
	};
}
