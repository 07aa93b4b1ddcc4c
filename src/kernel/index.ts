export { evidence } from './evidence';
export { smoothFour } from './four-maps';
export { rawShifts, smoothedShifts } from './shifts';
export { smoothGrid } from './smooth-grid';
export { tileBounds, tileRates } from './tile-rates';
export { tiledDecode } from './tiled-decode';
export { addLabel, parseRows } from './parse-rows';
