import { PRODUCT_VERSION } from "../results/version.js";
import { FUNCTIONS } from "./registry.js";

// The entry that Excel loads: each id of functions.json is bound to its body. A page whose library did not load still shows its help.
if (typeof CustomFunctions !== "undefined") for (const [id, run] of FUNCTIONS) CustomFunctions.associate(id, run);

// The pane compares this with its own page: Excel may keep an older copy of this file.
Object.assign(globalThis, { probeworthFunctions: PRODUCT_VERSION });
