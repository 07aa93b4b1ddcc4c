export { smoothFour } from './four-maps';
export { rawShifts, smoothedShifts } from './shifts';
export { tileBounds, tileRates } from './tile-rates';
export { tiledDecode } from './tiled-decode';
