/** Mass of each drive of the demo lab with its cement, g; taken off each weighing. */
export const IMPLANT_MASS_G = 21;
