/** What a field hands to its control so that label, hint and error are tied to it. */
export interface ControlAttributes {
	id: string;
	'aria-describedby': string | undefined;
	'aria-invalid': 'true' | undefined;
}

/** Properties every field component takes besides those of its own control. */
export interface FieldProps {
	name: string;
	label: string;
	hint?: string;
	errors?: string[] | null;
	unit?: string;
	isLabelHidden?: boolean;
	/** Classes of the whole field, for its place in a form grid. */
	class?: string;
}

export const controlClass =
	'w-full min-w-0 rounded-control border border-edge bg-paper px-2.5 text-base text-ink min-h-9 touch:min-h-11 disabled:opacity-55 [&[readonly]]:bg-well aria-invalid:border-fault aria-invalid:ring-1 aria-invalid:ring-fault';
