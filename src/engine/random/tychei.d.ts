// The package types its main entry only; the engine takes the one generator without the rest.
declare module "seedrandom/lib/tychei.js" {
  export default function tychei(seed: string): { double(): number; int32(): number };
}
