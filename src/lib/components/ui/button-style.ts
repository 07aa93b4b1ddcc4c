export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'danger';
export type ButtonSize = 'regular' | 'small';

const shape =
	'inline-flex items-center justify-center gap-2 rounded-control border font-semibold whitespace-nowrap select-none transition-colors disabled:cursor-not-allowed disabled:opacity-55 aria-disabled:cursor-not-allowed aria-disabled:opacity-55 touch:min-h-11 print:hidden';

const sizes: Record<ButtonSize, string> = {
	regular: 'min-h-9 px-3.5 text-sm',
	small: 'min-h-7 px-2.5 text-xs'
};

const kinds: Record<ButtonKind, string> = {
	primary: 'border-ink bg-ink text-paper hover:bg-ink/85',
	plain: 'border-rule bg-paper text-ink hover:border-edge hover:bg-well',
	quiet: 'border-transparent bg-transparent text-ink hover:bg-ink/8',
	danger: 'border-fault bg-paper text-fault hover:bg-fault hover:text-paper'
};

/** Buttons and links that look like buttons share one set of classes. */
export function buttonClass(kind: ButtonKind, size: ButtonSize): string {
	return `${shape} ${sizes[size]} ${kinds[kind]}`;
}
