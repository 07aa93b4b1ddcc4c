import { SCREW_PITCHES } from '$lib/analysis/geometry/screw-pitches';

/** A thread drives are built with. `pitchUm` is the travel of one turn. */
export interface DriveThread {
	name: string;
	pitchUm: number;
}

/** The usual threads with their pitch rounded as the record keeps it, to a nanometre. */
export const DRIVE_THREADS: DriveThread[] = SCREW_PITCHES.map(({ name, pitchUm }) => ({
	name,
	pitchUm: Math.round(pitchUm * 1000) / 1000
}));

export function pitchOfThread(name: string): number | null {
	return DRIVE_THREADS.find((thread) => thread.name === name)?.pitchUm ?? null;
}
