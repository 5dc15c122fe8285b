import type { KeptRows } from "../jobs/batch.js";
import type { RowKind, RowRun } from "../jobs/realisations.js";
import { KEPT_VERSION } from "../jobs/simulation-state.js";
import type { RunOrder } from "./run-order.js";

/** A place on this machine where runs are kept. */
export interface RunShelf {
  /** keeps an order under the hash of its inputs; older ones beyond the last few are let go */
  put(inputs: string, order: RunOrder): Promise<void>;
  /** keeps further realisations of it */
  add(inputs: string, kind: RowKind, runs: readonly RowRun[]): Promise<void>;
  /** @returns all realisations of these inputs; empty where there are none */
  rows(inputs: string): Promise<KeptRows>;
  /** @returns the order that was kept last; undefined where there is none of this version */
  latest(): Promise<{ readonly inputs: string; readonly order: RunOrder } | undefined>;
  /** lets everything go */
  clear(): Promise<void>;
}

interface KeptOrder {
  readonly inputs: string;
  readonly version: string;
  readonly order: RunOrder;
}

interface KeptRun extends RowRun {
  readonly inputs: string;
  readonly kind: RowKind;
}

const NAME = "probeworth-runs";
const ORDERS = "orders";
const ROWS = "rows";
/** Enough for a second thought and another workbook; a run takes some megabytes. */
const MOST_RUNS = 4;

/** A storage that has not opened by then is taken for none, milliseconds. */
const LONGEST_OPENING = 5_000;

/** The shelf in the browser's own storage, which belongs to this page's origin and never leaves the machine. */
export function browserShelf(): RunShelf {
  let opened: Promise<IDBDatabase> | undefined;
  // A browser may close a storage under the page, or refuse it once: the next call opens it anew.
  const forget = (): void => void (opened = undefined);
  const base = (): Promise<IDBDatabase> => {
    if (opened === undefined) (opened = inTime(open(forget))).catch(forget);
    return opened;
  };
  return {
    async put(inputs, order) {
      const work = (await base()).transaction([ORDERS, ROWS], "readwrite");
      const orders = work.objectStore(ORDERS);
      orders.put({ inputs, version: KEPT_VERSION, order } satisfies KeptOrder);
      const all = (await answer(orders.getAll())) as KeptOrder[];
      const old = all.sort((a, b) => b.order.at - a.order.at).filter((kept, k) => k >= MOST_RUNS || kept.version !== KEPT_VERSION);
      for (const kept of old) {
        orders.delete(kept.inputs);
        const keys = await answer(work.objectStore(ROWS).index("inputs").getAllKeys(kept.inputs));
        for (const key of keys) work.objectStore(ROWS).delete(key);
      }
      await finished(work);
    },
    async add(inputs, kind, runs) {
      const work = (await base()).transaction(ROWS, "readwrite");
      for (const run of runs) work.objectStore(ROWS).add({ inputs, kind, from: run.from, count: run.count, values: run.values } satisfies KeptRun);
      // a page that is going has no further turn in which the transaction would end by itself
      work.commit();
      await finished(work);
    },
    async rows(inputs) {
      const work = (await base()).transaction([ORDERS, ROWS]);
      const kept = (await answer(work.objectStore(ORDERS).get(inputs))) as KeptOrder | undefined;
      if (kept?.version !== KEPT_VERSION) return { elements: [], form: [] };
      const runs = (await answer(work.objectStore(ROWS).index("inputs").getAll(inputs))) as KeptRun[];
      const of = (kind: RowKind): RowRun[] => runs.filter((run) => run.kind === kind).sort((a, b) => a.from - b.from);
      return { elements: of("elements"), form: of("form") };
    },
    async latest() {
      const all = (await answer((await base()).transaction(ORDERS).objectStore(ORDERS).getAll())) as KeptOrder[];
      const [last] = all.filter(({ version }) => version === KEPT_VERSION).sort((a, b) => b.order.at - a.order.at);
      return last === undefined ? undefined : { inputs: last.inputs, order: last.order };
    },
    async clear() {
      const work = (await base()).transaction([ORDERS, ROWS], "readwrite");
      work.objectStore(ORDERS).clear();
      work.objectStore(ROWS).clear();
      await finished(work);
    },
  };
}

async function open(closed: () => void): Promise<IDBDatabase> {
  if (typeof indexedDB === "undefined") throw new Error("this browser gives the page none");
  const request = indexedDB.open(NAME, 1);
  request.onupgradeneeded = () => {
    request.result.createObjectStore(ORDERS, { keyPath: "inputs" });
    request.result.createObjectStore(ROWS, { autoIncrement: true }).createIndex("inputs", "inputs");
  };
  const base = await answer(request);
  base.onclose = closed;
  return base;
}

function inTime<T>(work: Promise<T>): Promise<T> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => reject(new Error("it does not answer")), LONGEST_OPENING);
    void work.then(resolve, reject).finally(() => clearTimeout(timer));
  });
}

function answer<T>(request: IDBRequest<T>): Promise<T> {
  return new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(reasonOf(request.error));
  });
}

function finished(work: IDBTransaction): Promise<void> {
  return new Promise((resolve, reject) => {
    work.oncomplete = () => resolve();
    work.onabort = work.onerror = () => reject(reasonOf(work.error));
  });
}

/** What the browser says, in words: its message may be empty, and the commonest reason is worth plain ones. */
function reasonOf(error: DOMException | null): Error {
  if (error?.name === "QuotaExceededError") return new Error("its room is used up");
  return new Error(error === null ? "it gave no reason" : error.message || error.name);
}
