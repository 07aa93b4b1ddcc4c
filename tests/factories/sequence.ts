let last = 0;

/** A number no other object of this test process has, for codes, names and addresses. */
export function nextNumber(): number {
	last += 1;
	return last;
}
