import { inInchRows } from './rows.ts';

/** ASME B36.10M, as ASTM A53 pipe is ordered: outer diameter, wall STD, XS, XXS, inches, from memory; 0 where there is none. */
export const PIPE = inInchRows(`
1/2 .84 .109 .147 0
3/4 1.05 .113 .154 0
1 1.315 .133 .179 0
1-1/4 1.66 .14 .191 0
1-1/2 1.9 .145 .2 0
2 2.375 .154 .218 .436
2-1/2 2.875 .203 .276 .552
3 3.5 .216 .3 .6
3-1/2 4 .226 .318 0
4 4.5 .237 .337 .674
5 5.563 .258 .375 .75
6 6.625 .28 .432 .864
8 8.625 .322 .5 .875
10 10.75 .365 .5 0
12 12.75 .375 .5 0
`);
