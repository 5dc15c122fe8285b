import type { Kind } from "../kind.js";

/** The service by which the library says that the ribbon's commands can be called. */
export const addInServiceKind: Kind<undefined> = {
  call: { notifyActionHandlerReady: () => null },
};
