/**
 * What advice is made from: plain records of one animal. Hours (`atH`) run on one axis of the
 * animal's own, such as hours since surgery; days are whole lab days. Depths and moves are µm along
 * the track, positive downward.
 */
export interface AnimalHistory {
	readonly bundles: readonly BundleHistory[];
	/** The decoding error has risen beyond its chart's limit and not come back. */
	readonly hasDecodingAlarm: boolean;
	/** Advances advised earlier because yield was lost, lowering left out. */
	readonly advances: readonly EarlierAdvance[];
	/** Bundles of other animals that shared a rig or headstage on a day. */
	readonly neighbours: readonly NeighbourDay[];
}

export interface BundleHistory {
	readonly bundle: string;
	/** Only `record` is advised on its yield. */
	readonly role: string;
	readonly kind: 'tetrode' | 'stereotrode' | 'wire' | 'shank';
	/** A person took the bundle out of the game. */
	readonly isParked: boolean;
	/** A person has confirmed that it is in its layer; ends lowering whatever the depth says. */
	readonly isInLayer: boolean;
	readonly depthUm: number;
	/** Depth where the layer is expected; null when nobody entered it. */
	readonly layerDepthUm: number | null;
	readonly travelLeftUm: number;
	/** One full turn of its screw. */
	readonly pitchUm: number;
	/** Ascending in time, voided ones left out. */
	readonly moves: readonly Move[];
	/** Ascending, one a day, of one source: counts by eye and sortings never share a list. */
	readonly days: readonly RecordedDay[];
	/** Ascending in time. */
	readonly landmarks: readonly Landmark[];
	/** Ascending in time. */
	readonly impedances: readonly ImpedanceReading[];
	readonly worths: readonly Worth[];
}

export interface Move {
	readonly atH: number;
	readonly day: number;
	readonly um: number;
}

export interface RecordedDay {
	readonly day: number;
	readonly atH: number;
	/** Units active in any epoch of the day, rest included. */
	readonly units: number;
	/** Of them, matched to the recorded day before in this list; null when nobody matched them. */
	readonly kept: number | null;
	/** ln median peak amplitude (ln µV) of its kept units; null without any. */
	readonly lnAmplitude: number | null;
	/** Units that pass quality; null when not judged. */
	readonly passing: number | null;
	/** Sorter, reference, filter and headstage together: when it changes, baselines start anew. */
	readonly setup: string;
	/** An equipment fault or an exclusion: the day counts for nothing. */
	readonly isLeftOut: boolean;
	/** Counted by eye: advice from it is provisional. */
	readonly isByEye: boolean;
	/** Who counted. Two people count differently, so each is compared with earlier counts of theirs alone. */
	readonly reader: string;
}

export interface Landmark {
	readonly day: number;
	readonly atH: number;
	/** Where the tip stands by what was heard and seen; see `landmarkPlace`. */
	readonly place: LandmarkPlace;
}

export type LandmarkPlace = 'above' | 'in' | 'below' | 'unclear';

export interface ImpedanceReading {
	readonly atH: number;
	readonly isInBrain: boolean;
	/** At 1 kHz, one a channel; null not measured. */
	readonly kohm: readonly (number | null)[];
}

/** What the bundle's units add to decoding in one arena, with its 90 % interval. */
export interface Worth {
	readonly day: number;
	readonly arena: string;
	/** Bits a window. */
	readonly bits: number;
	readonly low: number;
	readonly high: number;
}

export interface EarlierAdvance {
	readonly bundle: string;
	readonly day: number;
}

export interface NeighbourDay {
	readonly day: number;
	/** Bundles that could have shown a fall, and those that did. */
	readonly able: number;
	readonly fell: number;
}

/** The moment that advice is asked for. */
export interface Asking {
	readonly day: number;
	readonly atH: number;
	/** Next session that must not be put at risk; null when none is booked. */
	readonly nextCriticalAtH: number | null;
}
