/** Published scores used by several tests; all from the R base package datasets. */

/** PlantGrowth (Dobson 1983): dried weights under control and two treatments. */
export const plantGrowth = [
  Float64Array.of(4.17, 5.58, 5.18, 6.11, 4.5, 4.61, 5.17, 4.53, 5.33, 5.14),
  Float64Array.of(4.81, 4.17, 4.41, 3.59, 5.87, 3.83, 6.03, 4.89, 4.32, 4.69),
  Float64Array.of(6.31, 5.12, 5.54, 5.5, 5.37, 5.29, 4.92, 6.15, 5.8, 5.26),
];

/** Orange (Draper & Smith 1998): trunk circumference of five trees at days 118, 484, 664 and 1004. */
export const orangeTrees = [
  Float64Array.of(30, 33, 30, 32, 30),
  Float64Array.of(58, 69, 51, 62, 49),
  Float64Array.of(87, 111, 75, 112, 81),
  Float64Array.of(115, 156, 108, 167, 125),
];

/** warpbreaks (Tippett 1950): breaks for wool A then B, each under tension L, M, H. */
export const warpBreaks = [
  Float64Array.of(26, 30, 54, 25, 70, 52, 51, 26, 67),
  Float64Array.of(18, 21, 29, 17, 12, 18, 35, 30, 36),
  Float64Array.of(36, 21, 24, 18, 10, 43, 28, 15, 26),
  Float64Array.of(27, 14, 29, 19, 29, 31, 41, 20, 44),
  Float64Array.of(42, 26, 19, 16, 39, 28, 21, 39, 29),
  Float64Array.of(20, 21, 24, 17, 13, 15, 15, 16, 28),
];

/** Means 2, 3 and 7, variance 1 each: sums of squares 42 between, 6 within. */
export const threeByThree = [Float64Array.of(1, 2, 3), Float64Array.of(2, 3, 4), Float64Array.of(6, 7, 8)];

/** Hand lotion sales of five brands (columns) in seven stores (Conover 1999, 5.8; R help page of quade.test). */
export const handLotion = [
  Float64Array.of(5, 1, 16, 5, 10, 19, 10),
  Float64Array.of(4, 3, 12, 4, 9, 18, 7),
  Float64Array.of(7, 1, 22, 3, 7, 28, 6),
  Float64Array.of(10, 0, 22, 5, 13, 37, 8),
  Float64Array.of(12, 2, 35, 4, 10, 58, 7),
];

/** Three participants, three levels: sums of squares 24 levels, 6 participants, 4 error. */
export const threeLevels = [Float64Array.of(1, 2, 3), Float64Array.of(2, 4, 6), Float64Array.of(6, 6, 6)];
