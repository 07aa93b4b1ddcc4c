import type { DatabaseError } from 'sequelize';
import { Conflict } from './errors';

/** Database constraints a person can run into, in words. The database decides; this only explains. */
export const CONSTRAINT_WORDS: Record<string, [code: string, message: string]> = {
	person_email_key: ['email-taken', 'Somebody with this mail address is a member already.'],
	invitation_open_key: [
		'already-invited',
		'This address has an open invitation. Withdraw it first.'
	],
	lab_setting_key_version_key: [
		'stale',
		'Somebody changed this setting at the same moment. Nothing was overwritten: open the page again and enter your change once more.'
	],
	project_name_key: ['name-taken', 'A project of this name exists.'],
	protocol_number_key: ['name-taken', 'A protocol of this number exists.'],
	arena_name_key: ['name-taken', 'An arena of this name exists.'],
	rig_name_key: ['name-taken', 'A rig of this name exists.'],
	drive_design_name_key: ['name-taken', 'A drive design of this name exists.'],
	drive_serial_key: ['serial-taken', 'A drive of this design and serial exists.'],
	animal_code_key: [
		'code-taken',
		'An animal of this code exists. Codes are used once, also after the end.'
	],
	animal_protocol_one_at_a_time: [
		'protocol-overlap',
		'The animal is on another protocol on some of these days. End that membership first.'
	],
	implant_letter_key: ['letter-taken', 'The animal has an implant of this letter.'],
	implant_drive_key: ['drive-in-use', 'This drive is in another implant.'],
	bundle_role_one_at_a_time: ['role-overlap', 'The bundle has another role on some of these days.'],
	epoch_no_overlap: ['epoch-overlap', 'Two epochs of a session cannot overlap in time.'],
	epoch_name_key: ['epoch-name-taken', 'Two epochs of a session cannot share a name.'],
	epoch_run_has_arena: ['epoch-needs-arena', 'A run epoch needs its arena.'],
	turn_within_travel: [
		'beyond-travel',
		'This would put the screw outside its travel at some moment. Nothing was recorded.'
	],
	turn_replaces_same_carriage: [
		'wrong-carriage',
		'A correction replaces a turn of the same carriage.'
	],
	turn_replaces_id_key: [
		'already-corrected',
		'This turn was corrected already. Correct the newer row.'
	],
	tally_once_key: [
		'already-counted',
		'This bundle has a count of this kind on this day. Withdraw it first.'
	],
	data_file_position_key: [
		'position-present',
		'The session has positions already. Withdraw them first.'
	],
	day_goes_forward: ['day-signed', 'The day is signed. What came later is added as an amendment.'],
	analysis_immutable: [
		'analysis-final',
		'A finished analysis is kept as computed. Ask for a new one.'
	],
	role_grant_once_key: ['role-held', 'This person holds that role already.'],
	protocol_person_once: [
		'named-already',
		'This person is named on the protocol for some of these days already.'
	],
	animal_project_once: [
		'project-overlap',
		'The animal is in this project on some of these days already.'
	],
	sealed_allocation_once_key: [
		'allocated-already',
		'The animal has a sealed group in this project. Withdraw it first.'
	],
	deputy_once_key: ['deputy-already', 'This person is a deputy for the animal already.'],
	site_implant_id_label_key: ['label-taken', 'The implant has a site of this name.'],
	carriage_implant_id_label_key: ['label-taken', 'The implant has a carriage of this name.'],
	carriage_implant_id_screw_order_key: [
		'order-taken',
		'Two carriages of the implant cannot have the same place in the order of screws.'
	],
	bundle_implant_id_label_key: ['label-taken', 'The implant has a bundle of this name.'],
	channel_bundle_id_number_key: ['number-taken', 'The bundle has a channel of this number.'],
	turn_zero_only_voids: [
		'nothing-turned',
		'A turn of nothing is no turn. To take a turn back from the record, correct it to 0.'
	],
	turn_immutable: [
		'turn-final',
		'The ledger of turns is kept as written. Correct a turn with a new row.'
	],
	log_immutable: ['log-final', 'The log is kept as written.'],
	lab_setting_immutable: ['setting-final', 'Settings are kept as written. Set a new version.'],
	unit_immutable: [
		'unit-final',
		'The spikes of a unit are kept as taken in. Upload a new sorting.'
	],
	arena_endpoints_together: ['half-an-end', 'Give both coordinates of both ends, or none.'],
	arena_endpoints_apart: ['ends-meet', 'The two ends of a track are two different points.'],
	exclusion_of_one_thing: [
		'exclude-one-thing',
		'An exclusion names one unit, one bundle, one session or one day.'
	]
};

function constraintOf(fault: unknown): string | undefined {
	if (typeof fault !== 'object' || fault === null) return undefined;
	if ('constraint' in fault && typeof fault.constraint === 'string') return fault.constraint;
	return undefined;
}

/** The refusal that a constraint's violation means, or undefined when it is a bug of ours. */
export function explainConstraint(fault: DatabaseError | Error): Conflict | undefined {
	const name = constraintOf(fault) ?? ('parent' in fault ? constraintOf(fault.parent) : undefined);
	const words = name === undefined ? undefined : CONSTRAINT_WORDS[name];
	return words && new Conflict(words[0], words[1], { cause: fault });
}
