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
