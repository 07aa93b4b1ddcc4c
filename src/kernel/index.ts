export { rawShifts, smoothedShifts } from './shifts';
