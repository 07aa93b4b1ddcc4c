/** Keys typed into a field are text, never commands. */
export function isTyping(target: EventTarget | null): boolean {
	if (!(target instanceof HTMLElement)) return false;
	return target.isContentEditable || target.closest('input, textarea, select') !== null;
}

/** A single letter pressed alone, outside fields. */
export function isCommandKey(event: KeyboardEvent, key: string): boolean {
	return (
		event.key === key &&
		!event.ctrlKey &&
		!event.metaKey &&
		!event.altKey &&
		!event.defaultPrevented &&
		!isTyping(event.target)
	);
}
