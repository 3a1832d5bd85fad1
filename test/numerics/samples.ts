/** Published scores used by the tests of one sample, pairs and two groups. */

/** Darwin's 15 pairs of maize: difference in height, eighths of an inch (Fisher 1935, table 3). */
export const darwin = Float64Array.from([49, -67, 8, 16, 6, 23, 28, 41, 14, 29, 56, 24, 75, 60, -48]);

/** Hours of sleep gained with two drugs, ten patients (Student 1908). */
export const drugOne = Float64Array.from([0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2]);
export const drugTwo = Float64Array.from([1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4]);

/** Weights of chicks on two feeds, grams (R datasets::chickwts). */
export const sunflower = Float64Array.from([423, 340, 392, 339, 341, 226, 320, 295, 334, 322, 297, 318]);
export const soybean = Float64Array.from([243, 230, 248, 327, 329, 250, 193, 271, 316, 267, 199, 171, 158, 248]);

/** Two small groups without ties. */
export const six = Float64Array.from([1.1, 2.3, 3.7, 4.1, 5.9, 7.2]);
export const five = Float64Array.from([0.5, 1.7, 2.9, 3.1, 4.6]);

export const scores = (...values: number[]): Float64Array => Float64Array.from(values);

/** Deterministic scores with ties and gaps, for comparisons of a fast and a plain computation. */
export function uneven(n: number): Float64Array {
  return Float64Array.from({ length: n }, (_, i) => ((i * i * 7919) % 101) / 4 + (i % 5 === 0 ? 20 : 0));
}

export function close(got: number | null | undefined, want: number, rtol = 1e-9): boolean {
  return typeof got === 'number' && Math.abs(got - want) <= rtol * Math.abs(want) + 1e-12;
}
