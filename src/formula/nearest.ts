/**
 * The name that was probably meant.
 *
 * @returns  the known name with the fewest changed letters, at most a third of them; undefined where none is near
 */
export function nearest(written: string, known: Iterable<string>): string | undefined {
  const target = written.toUpperCase().slice(0, 64);
  let best: string | undefined;
  let fewest = Math.floor(target.length / 3) + 1;
  for (const name of known) {
    if (Math.abs(name.length - target.length) >= fewest) continue;
    const changes = changedLetters(target, name.toUpperCase());
    if (changes < fewest) [best, fewest] = [name, changes];
  }
  return best;
}

function changedLetters(a: string, b: string): number {
  let previous = Array.from({ length: b.length + 1 }, (_, k) => k);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const replaced = (previous[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      current.push(Math.min(replaced, (previous[j] ?? 0) + 1, (current[j - 1] ?? 0) + 1));
    }
    previous = current;
  }
  return previous[b.length] ?? a.length;
}
