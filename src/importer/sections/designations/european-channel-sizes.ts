import { inMillimetreRows } from './rows.ts';

/**
 * Rolled channels and tees. Dimensions from memory; each row is held against the published area and inertia in
 * test/published.
 */

/**
 * DIN 1026-1, now EN 10365: depth, width, web, flange, fillet, edge radius in mm. Flanges slope by 8 % up to 300 and by
 * 5 % above, where the nominal thickness lies half way along what stands out.
 */
export const UPN = inMillimetreRows(`
80 80 45 6 8 8 4
100 100 50 6 8.5 8.5 4.5
120 120 55 7 9 9 4.5
140 140 60 7 10 10 5
160 160 65 7.5 10.5 10.5 5.5
180 180 70 8 11 11 5.5
200 200 75 8.5 11.5 11.5 6
220 220 80 9 12.5 12.5 6.5
240 240 85 9.5 13 13 6.5
260 260 90 10 14 14 7
280 280 95 10 15 15 7.5
300 300 100 10 16 16 8
320 320 100 14 17.5 17.5 8.75
350 350 100 14 16 16 8
380 380 102 13.5 16 16 8
400 400 110 14 18 18 9
`);

/** Parallel flanges, DIN 1026-2, now EN 10365: depth, width, web, flange, fillet in mm. */
export const UPE = inMillimetreRows(`
80 80 50 4 7 10
100 100 55 4.5 7.5 10
120 120 60 5 8 12
140 140 65 5 9 12
160 160 70 5.5 9.5 12
180 180 75 5.5 10.5 12
200 200 80 6 11 13
220 220 85 6.5 12 13
240 240 90 7 12.5 15
270 270 95 7.5 13.5 15
300 300 100 9.5 15 15
330 330 105 11 16 18
360 360 110 12 17 18
400 400 115 13.5 18 18
`);

/** Parallel flanges, BS 4-1, now EN 10365: depth, width, web, flange, fillet in mm. */
export const PFC = inMillimetreRows(`
430x100x64 430 100 11 19 15
380x100x54 380 100 9.5 17.5 15
300x100x46 300 100 9 16.5 15
300x90x41 300 90 9 15.5 12
260x90x35 260 90 8 14 12
260x75x28 260 75 7 12 12
230x90x32 230 90 7.5 14 12
230x75x26 230 75 6.5 12.5 12
200x90x30 200 90 7 14 12
200x75x23 200 75 6 12.5 12
180x90x26 180 90 6.5 12.5 12
180x75x20 180 75 6 10.5 12
150x90x24 150 90 6.5 12 12
150x75x18 150 75 5.5 10 12
125x65x15 125 65 5.5 9.5 12
100x50x10 100 50 5 8.5 9
`);

/** Equal tees of EN 10055, as wide as deep: depth, thickness in mm. Web and flange slope by 2 %. */
export const TEE = inMillimetreRows(`
30 30 4
35 35 4.5
40 40 5
50 50 6
60 60 7
70 70 8
80 80 9
100 100 11
120 120 13
140 140 15
`);
