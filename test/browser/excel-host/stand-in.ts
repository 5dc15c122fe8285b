/**
 * What Excel for Windows puts into a page before its scripts run. The library talks to it, and it passes everything on to
 * the test's side; it decides nothing.
 */
export type Answer = (args: unknown, code?: number) => boolean | void;

interface Window2 {
  excelSettings: { readonly matrix: string; readonly flags: number };
  excelExecute(id: number, request: string): Promise<{ status: number; body: string }>;
  excelDeliver(messages: readonly (readonly unknown[])[]): void;
  excelFire(event: number, payload: readonly unknown[]): boolean;
}

const page = window as unknown as Window2;
const handlers = new Map<number, Set<(event: number, payload: unknown) => void>>();

/** The form in which a COM host hands over lists. */
function list(items: readonly unknown[]): object {
  return { toArray: () => items, dimensions: () => 1 };
}

const context = {
  GetAppType: () => 1,
  GetSolutionRef: () => "adcf2c65-7c41-47eb-8c06-697bf6195e7f",
  GetAppVersionMajor: () => 16,
  GetAppVersionMinor: () => 1,
  GetAppUILocale: () => 1033,
  GetAppDataLocale: () => 1033,
  GetDocUrl: () => "C:\\Bids\\Bid.xlsx",
  GetAppCapabilities: () => 3,
  GetActivationMode: () => 0,
  GetControlIntegrationLevel: () => 0,
  GetSolutionToken: () => "",
  GetSupportedMatrix: () => page.excelSettings.matrix,
  GetHostFullVersion: () => "16.0.17928.20000",
  GetSettings: () => ({ Read: () => undefined, Write: () => undefined }),
};

const excelExternal = {
  GetHostInfo: () => `Excel$Win32$16.01$en-US$$$disableLogging$${page.excelSettings.flags}`,
  GetContext: () => context,
  Execute(id: number, params: unknown, answer: Answer): void {
    void page.excelExecute(id, JSON.stringify(params)).then(({ status, body }) => {
      if (status === 0) answer(list([0, list([200, [], body])]));
      else answer(list([status, list([status, "", ""])]));
    });
  },
  RegisterEvent(id: number, _target: unknown, handler: (event: number, payload: unknown) => void, answer: Answer): void {
    handlers.set(id, (handlers.get(id) ?? new Set()).add(handler));
    answer(0);
  },
  UnregisterEvent(id: number, _target: unknown, answer: Answer): void {
    handlers.delete(id);
    answer(0);
  },
};

page.excelDeliver = (messages) => {
  page.excelFire(RICH_API_MESSAGE, messages.map(list));
};
page.excelFire = (event, payload) => {
  const told = handlers.get(event) ?? new Set();
  for (const handler of told) handler(event, list(payload));
  return told.size > 0;
};
const RICH_API_MESSAGE = 33;

Object.defineProperty(window, "external", { configurable: true, value: excelExternal });
