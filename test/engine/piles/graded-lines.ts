/** Steps from `from` to `to` that begin with `first` and grow by about `ratio`, as places; the growth is chosen so that the last one is `to`. */
export function graded(from: number, to: number, first: number, ratio: number): number[] {
  const span = Math.abs(to - from);
  const towards = Math.sign(to - from);
  const count = Math.max(1, Math.ceil(Math.log1p((span / first) * (ratio - 1)) / Math.log(ratio)));
  let low = 1;
  let high = ratio * 2;
  const sum = (q: number) => (Math.abs(q - 1) < 1e-12 ? count * first : (first * (q ** count - 1)) / (q - 1));
  for (let i = 0; i < 100; i++) {
    const middle = (low + high) / 2;
    if (sum(middle) < span) low = middle;
    else high = middle;
  }
  const places = [from];
  for (let i = 0; i < count; i++) places.push(i === count - 1 ? to : places[i] + towards * first * low ** i);
  return places;
}

/** The places with each interval cut into n. */
export function refined(places: readonly number[], n: number): number[] {
  const out = [places[0]];
  for (let i = 1; i < places.length; i++) for (let k = 1; k <= n; k++) out.push(k === n ? places[i] : places[i - 1] + ((places[i] - places[i - 1]) * k) / n);
  return out;
}
