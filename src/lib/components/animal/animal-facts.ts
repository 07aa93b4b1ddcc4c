/** What the head of every animal page needs; plain values, ready to come from a load. */
export interface AnimalFacts {
	code: string;
	species: string;
	strain: string | null;
	sex: string | null;
	/** "2026-02-14". */
	birthDate: string | null;
	/** Number of the approved protocol in force. */
	protocol: string | null;
	/** Lowest share of the baseline weight the protocol allows, 0 to 1; null without a protocol. */
	floorShare: number | null;
	/** The latest weight without the implant's mass, and its share of the baseline. */
	weight: { weightG: number; share: number | null; at: string } | null;
	/** "Right dorsal CA1, 16 tetrodes". */
	implant: { summary: string; surgeon: string } | null;
}
