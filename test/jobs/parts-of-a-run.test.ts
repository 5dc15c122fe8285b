import { describe, expect, it } from "vitest";
import { OutcomeRows } from "../../src/jobs/outcome-rows.js";
import { timeInWords } from "../../src/jobs/time-in-words.js";
import { webThreads, type PageWorker } from "../../src/jobs/web-threads.js";
import { wordsOf } from "../../src/jobs/words-of-failure.js";
import { WorkList } from "../../src/jobs/work-list.js";
import { WorkSpeed } from "../../src/jobs/work-speed.js";

describe("rows by index", () => {
  const run = (from: number, ...values: number[][]) => ({ from, count: values.length, values: Float64Array.from(values.flat()) });

  it("are listed in order whatever order they came in, and given back as unbroken runs", () => {
    const rows = new OutcomeRows(10);
    rows.add(run(13, [4, 4]));
    rows.add(run(10, [1, 1], [2, 2]));
    expect([rows.size, rows.prefix, rows.has(12), rows.has(13)]).toEqual([3, 2, false, true]);
    expect(rows.runs()).toEqual([run(10, [1, 1], [2, 2]), run(13, [4, 4])]);
    expect(() => rows.list(3)).toThrow("3 realisations were asked for and 2 are there in order");
    rows.add(run(12, [3, 3]));
    expect(rows.list(4).map(([first]) => first)).toEqual([1, 2, 3, 4]);
    expect(rows.runs()).toEqual([run(10, [1, 1], [2, 2], [3, 3], [4, 4])]);
  });

  it("stay as they came first, and know when the same comes out otherwise", () => {
    const rows = new OutcomeRows();
    rows.add(run(0, [1, 2]));
    rows.add(run(0, [7, 8], [3, 4]));
    expect(rows.list(2).map((row) => [...row])).toEqual([[1, 2], [3, 4]]);
    expect(rows.agrees(run(0, [1, 2], [3, 4], [9, 9]))).toBe(true);
    expect(rows.agrees(run(1, [3, 4 + 1e-15]))).toBe(false);
    expect(rows.agrees(run(0, [1]))).toBe(false);
  });

  it("refuse another width, an index before the first, and what is no number", () => {
    const rows = new OutcomeRows(2);
    rows.add(run(2, [1, 2]));
    expect(() => rows.add(run(3, [1]))).toThrow("realisation 4 came with 1 figures instead of 2");
    expect(() => rows.add(run(1, [1, 2]))).toThrow("realisation 2 lies before the first of this part, 3");
    expect(() => rows.add(run(3, [1, 2], [1, Number.POSITIVE_INFINITY]))).toThrow("realisation 5 gave a figure that is no number");
  });
});

describe("the list of work", () => {
  const fresh = () => {
    const rows = { elements: new OutcomeRows(), form: new OutcomeRows() };
    const speed = new WorkSpeed();
    return { rows, speed, list: new WorkList(rows, speed) };
  };

  it("hands out each missing realisation once: a few cheap ones, then elements, then the rest in pieces of 80 ms", () => {
    const { rows, speed, list } = fresh();
    rows.elements.add({ from: 1, count: 1, values: Float64Array.of(1) });
    const wanted = { elements: 3, form: 100 };
    for (const from of [0, 4, 8]) {
      expect(list.take(wanted, 0)).toEqual({ of: "form", from, count: 4 });
      speed.add("form", 8, 4);
    }
    expect([list.take(wanted, 0), list.take(wanted, 0)]).toEqual([{ of: "elements", from: 0, count: 1 }, { of: "elements", from: 2, count: 1 }]);
    expect(list.take(wanted, 0)).toEqual({ of: "form", from: 12, count: 40 });
    expect(list.take(wanted, 0)).toEqual({ of: "form", from: 52, count: 40 });
    expect(list.take(wanted, 0)).toEqual({ of: "form", from: 92, count: 8 });
    expect(list.take(wanted, 0)).toBeUndefined();
    expect([list.take(wanted, 2), list.take(wanted, 2), list.take(wanted, 2)]).toEqual([{ of: "elements", from: 3, count: 1 }, { of: "elements", from: 4, count: 1 }, undefined]);
  });

  it("begins with a kept row, to see whether it comes out the same", () => {
    const rows = { elements: new OutcomeRows(), form: new OutcomeRows() };
    rows.form.add({ from: 0, count: 6, values: new Float64Array(6) });
    const list = new WorkList(rows, new WorkSpeed());
    expect(list.take({ elements: 1, form: 8 }, 0)).toEqual({ of: "form", from: 0, count: 1 });
    expect(list.take({ elements: 1, form: 8 }, 0)).toEqual({ of: "form", from: 6, count: 2 });
  });
});

it("tells the time left by the median of the last pieces, because a machine may have slept during one", () => {
  const speed = new WorkSpeed();
  expect(speed.seconds(4, 0, 1)).toBeUndefined();
  speed.add("elements", 8 * 3_600_000, 1);
  expect(speed.seconds(4, 0, 1)).toBeUndefined();
  speed.add("elements", 1_000, 1);
  expect(speed.seconds(4, 0, 1)).toBe(4);
  for (const time of [2_000, 1_000, 3_600_000, 1_000, 1_000]) speed.add("elements", time, 1);
  expect(speed.seconds(4, 0, 2)).toBe(2);
  expect(speed.seconds(4, 1, 2)).toBeUndefined();
  for (const time of [30, 60]) speed.add("form", time, 3);
  expect(speed.seconds(4, 100, 1)).toBe(5);
  for (let k = 0; k < 24; k++) speed.add("elements", 500, 1);
  expect(speed.seconds(4, 0, 1)).toBe(2);
});

it.each([[0.2, "1 second"], [1, "1 second"], [89, "89 seconds"], [100, "2 minutes"], [5_000, "83 minutes"], [7_200, "2 hours"], [200_000, "2 days"], [63_072_001, "2 years"], [4e10, "1,268 years"]])("says %d s as %s", (seconds, words) => {
  expect(timeInWords(seconds)).toBe(words);
});

describe("web workers", () => {
  class Fake implements PageWorker {
    readonly sent: unknown[] = [];
    isEnded = false;
    onmessage: PageWorker["onmessage"] = null;
    onmessageerror: PageWorker["onmessageerror"] = null;
    onerror: PageWorker["onerror"] = null;
    postMessage(message: unknown): void {
      this.sent.push(message);
    }
    terminate(): void {
      this.isEnded = true;
    }
  }
  const heard: string[] = [];
  const listener = { reply: (reply: { kind: string }) => void heard.push(reply.kind), lost: (reason: string) => void heard.push(`lost: ${reason}`) };

  // one core for the page itself, never more than four, never none
  it.each([[1, undefined, 1], [2, undefined, 1], [4, undefined, 3], [16, undefined, 4], [undefined, undefined, 1], [8, 2, 2], [8, 9, 4], [8, 0, 1]])("on %s cores, %s wanted, are %s", (cores, wanted, size) => {
    expect(webThreads(() => new Fake(), cores, wanted).size).toBe(size);
  });

  it("pass requests and answers on, say why they are lost, and are silent once ended", () => {
    const worker = new Fake();
    const thread = webThreads(() => worker, 2).start(listener);
    thread.post({ kind: "prepare", task: 5 });
    expect(worker.sent).toEqual([{ kind: "prepare", task: 5 }]);
    worker.onmessage!(new MessageEvent("message", { data: { kind: "ready" } }));
    worker.onerror!({ message: "Uncaught RangeError: Array buffer allocation failed" } as ErrorEvent);
    worker.onerror!({ message: "" } as ErrorEvent);
    worker.onmessageerror!(new MessageEvent("messageerror"));
    expect(heard).toEqual([
      "ready",
      "lost: its memory ran out (Array buffer allocation failed); fewer threads, or a smaller foundation, need less",
      "lost: its thread could not be started",
      "lost: its answer could not be read",
    ]);
    thread.end();
    expect([worker.isEnded, worker.onmessage, worker.onerror]).toEqual([true, null, null]);
  });
});

it("tells a failure in words, whatever was thrown", () => {
  expect(wordsOf(new Error("the matrix is not positive definite."))).toBe("the matrix is not positive definite");
  expect(wordsOf("stop")).toBe("stop");
  expect(wordsOf(new Error(""))).toBe("no reason was given");
  expect(wordsOf(new RangeError("Invalid typed array length: 9e15"))).toMatch(/^its memory ran out/);
  expect(wordsOf(Object.assign(new Error("Worker terminated due to reaching memory limit"), { code: "ERR_WORKER_OUT_OF_MEMORY" }))).toMatch(/^its memory ran out \(Worker/);
});
