import { resolve } from '$app/paths';
import type { ResolvedPathname } from '$app/types';
import CircleGauge from '@lucide/svelte/icons/circle-gauge';
import FlaskConical from '@lucide/svelte/icons/flask-conical';
import Rat from '@lucide/svelte/icons/rat';
import type { Component } from 'svelte';

interface NavItem {
	label: string;
	href: ResolvedPathname;
	Icon: Component<{ class?: string }>;
}

/** The rooms there are, in the order of a working day. */
export function navItems(): NavItem[] {
	return [
		{ label: 'Today', href: resolve('/'), Icon: CircleGauge },
		{ label: 'Animals', href: resolve('/animals'), Icon: Rat },
		{ label: 'Lab', href: resolve('/lab'), Icon: FlaskConical }
	];
}

/** Whether a page belongs to a room; the front page is only itself. */
export function isInRoom(pathname: string, href: string, front: string): boolean {
	if (href === front) return pathname === front;
	return pathname === href || pathname.startsWith(`${href}/`);
}
