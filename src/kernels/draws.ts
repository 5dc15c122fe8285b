// AssemblyScript. The twin of src/engine/numerics/scalar-draws.ts: the same products and sums in the same order, so that both give the same
// bits. A lane is a draw. Places count doubles from the start of memory; the number of draws is even.

const DOUBLE: usize = 3;

/** Adding and taking off 1.5 x 2^52 rounds to a whole number, which then stands in the lowest bits. */
const ROUNDER: f64 = 6755399441055744;
const LEAST: f64 = -708;
const MOST: f64 = 708;
/** ln 2 in two parts, of which the first has zeros enough for its products to be exact. */
const LN2_HIGH: f64 = 6.93147180369123816490e-1;
const LN2_LOW: f64 = 1.90821492927058770002e-10;

/** See `exponential` in src/engine/numerics/exponential.ts. */
function exponential(value: v128): v128 {
  const x = f64x2.pmin(f64x2.pmax(value, f64x2.splat(LEAST)), f64x2.splat(MOST));
  const shifted = f64x2.add(f64x2.mul(x, f64x2.splat(1.4426950408889634)), f64x2.splat(ROUNDER));
  const k = f64x2.sub(shifted, f64x2.splat(ROUNDER));
  const r = f64x2.sub(f64x2.sub(x, f64x2.mul(k, f64x2.splat(LN2_HIGH))), f64x2.mul(k, f64x2.splat(LN2_LOW)));
  let p = f64x2.splat(1.6059043836821613e-10);
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(2.08767569878681e-9));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(2.505210838544172e-8));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(2.755731922398589e-7));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(2.7557319223985893e-6));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(2.48015873015873e-5));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(1.984126984126984e-4));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(1.388888888888889e-3));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(8.333333333333333e-3));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(4.1666666666666664e-2));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(1.6666666666666666e-1));
  p = f64x2.add(f64x2.mul(p, r), f64x2.splat(0.5));
  const near = f64x2.add(f64x2.splat(1), f64x2.add(r, f64x2.mul(f64x2.mul(r, r), p)));
  const power = f64x2.mul(near, i64x2.add(i64x2.shl(shifted, 52), i64x2.splat(0x3ff0000000000000)));
  return v128.andnot(power, f64x2.lt(value, f64x2.splat(LEAST)));
}

/** See `Kernels.addRows`. */
export function addRows(outAt: i32, factorsAt: i32, count: i32, tableAt: i32, draws: i32): void {
  const step = (<usize>draws) << DOUBLE;
  const out = (<usize>outAt) << DOUBLE;
  const table = (<usize>tableAt) << DOUBLE;
  const factors = (<usize>factorsAt) << DOUBLE;
  const fours = factors + ((<usize>(count & ~3)) << DOUBLE);
  const end = factors + ((<usize>count) << DOUBLE);
  for (let m: usize = 0; m < step; m += 16) {
    let sum = v128.load(out + m);
    let z = table + m;
    let f = factors;
    for (; f < fours; f += 32) {
      let four = f64x2.mul(v128.load_splat<f64>(f), v128.load(z));
      z += step;
      four = f64x2.add(four, f64x2.mul(v128.load_splat<f64>(f, 8), v128.load(z)));
      z += step;
      four = f64x2.add(four, f64x2.mul(v128.load_splat<f64>(f, 16), v128.load(z)));
      z += step;
      four = f64x2.add(four, f64x2.mul(v128.load_splat<f64>(f, 24), v128.load(z)));
      z += step;
      sum = f64x2.add(sum, four);
    }
    for (; f < end; f += 8, z += step) sum = f64x2.add(sum, f64x2.mul(v128.load_splat<f64>(f), v128.load(z)));
    v128.store(out + m, sum);
  }
}

/** See `Kernels.settle`. */
export function settle(lnAt: i32, settlementAt: i32, numbersAt: i32, placesAt: i32, draws: i32): void {
  const step = (<usize>draws) << DOUBLE;
  const ln = (<usize>lnAt) << DOUBLE;
  const settlement = (<usize>settlementAt) << DOUBLE;
  const c = (<usize>numbersAt) << DOUBLE;
  const places = (<usize>placesAt) << DOUBLE;
  const z = (<usize>load<i32>(places)) << DOUBLE;
  const p0 = (<usize>load<i32>(places, 4)) << DOUBLE;
  const p1 = (<usize>load<i32>(places, 8)) << DOUBLE;
  const p2 = (<usize>load<i32>(places, 12)) << DOUBLE;
  const p3 = (<usize>load<i32>(places, 16)) << DOUBLE;
  const p4 = (<usize>load<i32>(places, 20)) << DOUBLE;
  for (let m: usize = 0; m < step; m += 16) {
    const x0 = v128.load(p0 + m), x1 = v128.load(p1 + m), x2 = v128.load(p2 + m), x3 = v128.load(p3 + m), x4 = v128.load(p4 + m);
    let sum = f64x2.add(v128.load_splat<f64>(c, 16), f64x2.mul(v128.load_splat<f64>(c, 8), v128.load(z + m)));
    let row = f64x2.add(v128.load_splat<f64>(c, 24), f64x2.mul(v128.load_splat<f64>(c, 64), x0));
    sum = f64x2.add(sum, f64x2.mul(row, x0));
    row = f64x2.add(v128.load_splat<f64>(c, 32), f64x2.mul(v128.load_splat<f64>(c, 72), x0));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 80), x1));
    sum = f64x2.add(sum, f64x2.mul(row, x1));
    row = f64x2.add(v128.load_splat<f64>(c, 40), f64x2.mul(v128.load_splat<f64>(c, 88), x0));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 96), x1));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 104), x2));
    sum = f64x2.add(sum, f64x2.mul(row, x2));
    row = f64x2.add(v128.load_splat<f64>(c, 48), f64x2.mul(v128.load_splat<f64>(c, 112), x0));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 120), x1));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 128), x2));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 136), x3));
    sum = f64x2.add(sum, f64x2.mul(row, x3));
    row = f64x2.add(v128.load_splat<f64>(c, 56), f64x2.mul(v128.load_splat<f64>(c, 144), x0));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 152), x1));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 160), x2));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 168), x3));
    row = f64x2.add(row, f64x2.mul(v128.load_splat<f64>(c, 176), x4));
    sum = f64x2.add(sum, f64x2.mul(row, x4));
    v128.store(ln + m, sum);
    v128.store(settlement + m, f64x2.mul(v128.load_splat<f64>(c), exponential(f64x2.neg(sum))));
  }
}

/** See `Kernels.largestDistortion`. */
export function largestDistortion(outAt: i32, settlementAt: i32, pairsAt: i32, count: i32, draws: i32): void {
  const step = (<usize>draws) << DOUBLE;
  const out = (<usize>outAt) << DOUBLE;
  const settlement = (<usize>settlementAt) << DOUBLE;
  const pairs = (<usize>pairsAt) << DOUBLE;
  const end = pairs + ((<usize>count) << 4);
  for (let m: usize = 0; m < step; m += 16) {
    let most = f64x2.splat(0);
    for (let pair = pairs; pair < end; pair += 16) {
      const a = v128.load(settlement + (<usize>load<i32>(pair)) * step + m);
      const b = v128.load(settlement + (<usize>load<i32>(pair, 4)) * step + m);
      most = f64x2.pmax(most, f64x2.mul(f64x2.abs(f64x2.sub(a, b)), v128.load_splat<f64>(pair, 8)));
    }
    v128.store(out + m, most);
  }
}
