/** Lightness and quality of nine canned-tuna lots: Hollander & Wolfe 1973, p. 187, as printed in R 4.2 ?cor.test. */
export const lightness = Float64Array.of(44.4, 45.9, 41.9, 53.3, 44.7, 44.1, 50.7, 45.2, 60.1);
export const quality = Float64Array.of(2.6, 3.1, 2.5, 5.0, 3.6, 4.0, 5.2, 2.8, 3.8);
