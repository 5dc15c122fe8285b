// The package has no types; only what the comparison needs is declared.
declare module "jstat" {
  interface Normal {
    cdf(x: number, mean: number, sd: number): number;
    inv(p: number, mean: number, sd: number): number;
    pdf(x: number, mean: number, sd: number): number;
  }
  const jstat: { readonly jStat: { readonly normal: Normal } };
  export default jstat;
}
