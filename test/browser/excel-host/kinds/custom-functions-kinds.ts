import type { Kind } from "../kind.js";
import type { RawResult } from "../function-results.js";

/** The objects by which the library's own runtime of custom functions says that it is ready, and gives results back. */
export const customFunctionsKinds: { readonly CustomFunctions: Kind<undefined>; readonly CustomFunctionsContainer: Kind<undefined> } = {
  CustomFunctions: {
    call: {
      _SetOsfControlContainerReadyForCustomFunctions: (_target, _given, { functions }) => functions.ready(),
      setInvocationArrayResults: (_target, given, { functions }) => functions.receive(given.any(0) as RawResult[]),
    },
  },
  CustomFunctionsContainer: {},
};
