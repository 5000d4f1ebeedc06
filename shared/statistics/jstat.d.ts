/** The few functions of jStat that are used here; the package ships no types. */
declare module 'jstat' {
  interface JStat {
    normal: { inv(p: number, mean: number, sd: number): number }
    studentt: { inv(p: number, degreesOfFreedom: number): number }
    chisquare: { inv(p: number, degreesOfFreedom: number): number }
    centralF: { inv(p: number, df1: number, df2: number): number }
    beta: { inv(p: number, a: number, b: number): number }
  }
  const jStat: JStat
  export default jStat
}
