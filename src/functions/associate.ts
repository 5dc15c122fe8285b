import { FUNCTIONS } from "./registry.js";

// The entry that Excel loads: each id of functions.json is bound to its body.
for (const [id, run] of FUNCTIONS) CustomFunctions.associate(id, run);
