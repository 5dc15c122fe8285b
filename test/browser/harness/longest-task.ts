import type { Page } from "playwright-core";

interface TraceEvent {
  readonly name: string;
  readonly ph: string;
  readonly pid: number;
  readonly tid: number;
  /** processor time of this task alone, microseconds */
  readonly tdur?: number;
  readonly args: { readonly name?: string };
}

/**
 * The longest task of the page's main thread while something is done, in processor time.
 *
 * @returns milliseconds
 */
export async function longestTask(page: Page, action: () => Promise<void>): Promise<number> {
  const session = await page.context().newCDPSession(page);
  const events: TraceEvent[] = [];
  session.on("Tracing.dataCollected", ({ value }) => events.push(...(value as unknown as TraceEvent[])));
  const complete = new Promise<void>((resolve) => session.once("Tracing.tracingComplete", () => resolve()));
  await session.send("Tracing.start", { transferMode: "ReportEvents", traceConfig: { includedCategories: ["toplevel", "disabled-by-default-devtools.timeline", "devtools.timeline"] } });
  await action();
  await session.send("Tracing.end");
  await complete;
  const mains = events.filter((event) => event.name === "thread_name" && event.args.name === "CrRendererMain").map((event) => `${event.pid}/${event.tid}`);
  const tasks = events.filter((event) => event.name === "RunTask" && event.tdur !== undefined && mains.includes(`${event.pid}/${event.tid}`));
  if (tasks.length === 0) throw new Error("the trace holds no task of a page's main thread, so nothing was measured");
  return Math.max(...tasks.map((task) => task.tdur! / 1000));
}
