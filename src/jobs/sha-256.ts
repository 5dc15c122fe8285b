const PRIMES = firstPrimes(64);
// the first 32 bits of the fractions of cube and square roots of the first primes, as the standard defines them
const ROUND = Uint32Array.from(PRIMES, (prime) => fraction(cubeRoot(prime)));
const START = Uint32Array.from(PRIMES.slice(0, 8), (prime) => fraction(Math.sqrt(prime)));

/**
 * The SHA-256 sum of bytes, at once: the page's own is a promise, and absent where the page is not served securely.
 *
 * @returns 64 hexadecimal digits
 * @source National Institute of Standards and Technology (2015), FIPS 180-4, Secure Hash Standard, section 6.2
 */
export function sha256(bytes: Uint8Array): string {
  const length = Math.ceil((bytes.length + 9) / 64) * 64;
  const padded = new Uint8Array(length);
  padded.set(bytes);
  padded[bytes.length] = 0x80;
  const view = new DataView(padded.buffer);
  view.setUint32(length - 8, Math.floor(bytes.length / 536870912));
  view.setUint32(length - 4, (bytes.length << 3) >>> 0);
  const state = START.slice();
  const w = new Uint32Array(64);
  for (let block = 0; block < length; block += 64) {
    for (let t = 0; t < 16; t++) w[t] = view.getUint32(block + 4 * t);
    for (let t = 16; t < 64; t++) {
      const [x, y] = [w[t - 15], w[t - 2]];
      w[t] = w[t - 16] + (turned(x, 7) ^ turned(x, 18) ^ (x >>> 3)) + w[t - 7] + (turned(y, 17) ^ turned(y, 19) ^ (y >>> 10));
    }
    mix(state, w);
  }
  return Array.from(state, (word) => word.toString(16).padStart(8, "0")).join("");
}

function mix(state: Uint32Array, w: Uint32Array): void {
  let [a, b, c, d, e, f, g, h] = state;
  for (let t = 0; t < 64; t++) {
    const first = (h + (turned(e, 6) ^ turned(e, 11) ^ turned(e, 25)) + ((e & f) ^ (~e & g)) + ROUND[t] + w[t]) >>> 0;
    const second = ((turned(a, 2) ^ turned(a, 13) ^ turned(a, 22)) + ((a & b) ^ (a & c) ^ (b & c))) >>> 0;
    h = g;
    g = f;
    f = e;
    e = (d + first) >>> 0;
    d = c;
    c = b;
    b = a;
    a = (first + second) >>> 0;
  }
  [a, b, c, d, e, f, g, h].forEach((word, k) => (state[k] += word));
}

function turned(word: number, by: number): number {
  return (word >>> by) | (word << (32 - by));
}

function fraction(value: number): number {
  return Math.floor((value - Math.floor(value)) * 4294967296);
}

/** By Newton's steps, which every engine takes alike; `Math.cbrt` need not. */
function cubeRoot(value: number): number {
  let root = value;
  for (let step = 0; step < 40; step++) root -= (root * root * root - value) / (3 * root * root);
  return root;
}

function firstPrimes(count: number): number[] {
  const found: number[] = [];
  for (let number = 2; found.length < count; number++) if (found.every((prime) => number % prime !== 0)) found.push(number);
  return found;
}
