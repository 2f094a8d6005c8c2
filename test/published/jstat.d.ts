/** The part of jstat that the comparisons use; the package ships no types. */
declare module 'jstat' {
  export const jStat: {
    mean(values: readonly number[]): number;
    stdev(values: readonly number[], sample: boolean): number;
    ttest(t: number, count: number, sides: 1 | 2): number;
    readonly studentt: { inv(probability: number, degreesOfFreedom: number): number };
  };
}
