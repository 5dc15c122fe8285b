import type { Kind } from "../kind.js";

/** The service by which the library says that the ribbon's commands can be called. */
export const addInServiceKind: Kind<undefined> = {
  call: { notifyActionHandlerReady: () => null },
};

const STATES = ["Inactive", "Background", "Visible"];

/** The service that shows and hides the pane of a shared runtime. */
export const appRuntimeKind: Kind<undefined> = {
  call: {
    getAppRuntimeState: (_target, _given, host) => host.paneState,
    setAppRuntimeState: (_target, given, host) => {
      host.paneState = given.choice(0, STATES, "");
    },
  },
};
