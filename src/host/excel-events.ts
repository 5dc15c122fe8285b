import { inExcel } from "./excel-refusal.js";

/** A calculation of a workbook reports every sheet by itself, and typing reports every cell. */
const PAUSE = 200;
/** A workbook that never rests, such as one with a clock, is looked at this often. */
const LONGEST_PAUSE = 2000;

interface Registered {
  remove(): void;
  readonly context: OfficeExtension.ClientRequestContext;
}

/**
 * Calls back after cells, sheets or their names have changed and the sheets have come to rest.
 *
 * @param handler  what to call
 * @param failed   is told why Excel does not report changes; then there are no calls
 * @returns        ends the calls and takes the handlers out of Excel
 */
export function watchWorkbook(handler: () => void, failed: (reason: unknown) => void = () => undefined): () => void {
  const pause = debounced(handler);
  let isOver = false;
  const onEvent = (): Promise<void> => {
    if (!isOver) pause.call();
    return Promise.resolve();
  };
  const registered = register(onEvent);
  registered.catch(failed);
  return () => {
    if (isOver) return;
    isOver = true;
    pause.stop();
    void registered.then(unregister).catch(() => undefined); // a workbook that is gone calls nobody
  };
}

async function register(onEvent: () => Promise<void>): Promise<Registered[]> {
  return inExcel(async (context) => {
    const { worksheets } = context.workbook;
    const handlers: Registered[] = [
      worksheets.onChanged.add(onEvent),
      worksheets.onCalculated.add(onEvent),
      worksheets.onAdded.add(onEvent),
      worksheets.onDeleted.add(onEvent),
    ];
    // only later versions say that a sheet was given another name
    if (Office.context.requirements.isSetSupported("ExcelApi", "1.17")) handlers.push(worksheets.onNameChanged.add(onEvent));
    await context.sync();
    return handlers;
  });
}

async function unregister(handlers: readonly Registered[]): Promise<void> {
  const context = handlers[0]?.context;
  if (context === undefined) return;
  await Excel.run(context as Excel.RequestContext, async (same) => {
    for (const handler of handlers) handler.remove();
    await same.sync();
  });
}

function debounced(handler: () => void): { call(): void; stop(): void } {
  let timer: ReturnType<typeof setTimeout> | undefined;
  let since = 0;
  const stop = (): void => {
    clearTimeout(timer);
    timer = undefined;
  };
  return {
    stop,
    call: () => {
      const now = performance.now();
      if (timer === undefined) since = now;
      stop();
      timer = setTimeout(() => {
        timer = undefined;
        handler();
      }, Math.max(0, Math.min(PAUSE, since + LONGEST_PAUSE - now)));
    },
  };
}
