import type { Epoch } from '$lib/analysis/position/epochs';
import type { Ends } from '$lib/analysis/arena/along-straight';

/** Why a file was refused, where in it, and how to mend it. */
export interface DataRefusal {
	code: string;
	message: string;
	/** 1-based, the header is row 1; null when no row is to blame. */
	row: number | null;
	column: string | null;
}

/** Why an analysis could not be finished. `canRetry` is false when the inputs are to blame. */
export interface AnalysisFailure {
	code: string;
	message: string;
	canRetry: boolean;
}

/** What an analysis reads from the session besides its files, frozen when it is asked for. */
export interface AnalysisSetup {
	arenaId: string;
	arenaName: string;
	/** All epochs; run epochs in another arena stand as rest, so that they are not used. */
	epochs: Epoch[];
	ends?: Ends;
}

/** How a person said a table is to be read. Fields carry their units: `t_ms`, `x_px`. */
export interface ReadingChoice {
	decimal?: '.' | ',';
	/** Header of a column → field it holds, '' to leave it out. */
	mapping?: Record<string, string>;
	pxPerCm?: number;
	/** Unit labels, when times and labels came as two arrays. */
	labelsFileId?: string;
}

/** What is known of how a file is to be read: what was recognised, what was chosen, what was found. */
export interface DataReading {
	recognised?: {
		delimiter: ',' | ';' | '\t';
		decimal: '.' | ',';
		header: string[];
		/** First rows as written. */
		rows: string[][];
		columns: { column: string; field: string | null; isCertain: boolean }[];
		missing: string[];
		needsConfirming: boolean;
	};
	chosen?: ReadingChoice;
	found?: { firstS: number; lastS: number; units?: number; warnings?: string[] };
}
