/** Implants of an animal are A, B, C …; addresses may be typed in small letters. */
export const match = (param: string): boolean => /^[A-Za-z]$/.test(param);
