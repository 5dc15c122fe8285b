import type { Pane } from "./mount-pane.js";

/** What the ribbon's buttons do; the manifest names them so. Opening the pane needs no command of its own. */
const COMMANDS: Readonly<Record<string, (pane: Pane) => Promise<void> | void>> = {
  InsertSiteBlock: async (pane) => {
    pane.show("Site");
    await pane.insertTemplate();
  },
  OpenRun: (pane) => pane.show("Run"),
  Repair: async (pane) => {
    pane.show("Help");
    await pane.repair();
  },
};

/**
 * Binds the ribbon's buttons. Each brings the pane into sight, because what it did or why it could not is said there.
 *
 * @param ready  the pane once it stands
 */
export function ribbonCommands(ready: Promise<Pane>): void {
  for (const [id, command] of Object.entries(COMMANDS)) {
    Office.actions.associate(id, (event?: Office.AddinCommands.Event) => {
      void perform(ready, command).finally(() => event?.completed()); // Excel greys the button until it is told
    });
  }
}

async function perform(ready: Promise<Pane>, command: (pane: Pane) => Promise<void> | void): Promise<void> {
  // A pane that Excel does not show still does what was asked.
  await Office.addin.showAsTaskpane().catch(() => undefined);
  await command(await ready);
}
