/** What office.js sends in one synchronisation. */
export interface WireRequest {
  readonly AutoKeepReference?: boolean;
  readonly Actions: readonly WireAction[];
  readonly ObjectPaths: Readonly<Record<string, WirePath>>;
}

/** How the library writes down an object: where it comes from. */
export interface WirePath {
  readonly Id: number;
  readonly ObjectPathType: number;
  readonly Name: string;
  readonly ParentObjectPathId?: number;
  readonly ArgumentInfo?: WireArguments;
}

/** Kinds of WirePath. */
export const PATH = { root: 1, service: 2, method: 3, property: 4, indexer: 5, reference: 6, none: 7 } as const;

/** One thing to do with an object. */
export interface WireAction {
  readonly Id: number;
  readonly ActionType: number;
  readonly Name: string;
  readonly ObjectPathId: number;
  readonly ArgumentInfo?: WireArguments;
  readonly QueryInfo?: WireQuery;
}

/** Kinds of WireAction. */
export const ACTION = { instantiate: 1, query: 2, method: 3, set: 4, trace: 5 } as const;

/** Arguments; an object among them stands as the number of its path, marked in the second list. */
export interface WireArguments {
  readonly Arguments?: readonly unknown[];
  readonly ReferencedObjectPathIds?: readonly unknown[];
}

/** Which properties to read; "format/fill/color" goes through objects. */
export interface WireQuery {
  readonly Select?: readonly string[];
  readonly Expand?: readonly string[];
  readonly Top?: number;
  readonly Skip?: number;
}

/** What the host answers. */
export interface WireReply {
  readonly Results: { ActionId: number; Value: unknown }[];
  readonly TraceIds: number[];
  readonly Error?: { Code: string; Message: string; ActionIndex: number; Location: string; HttpStatusCode: number };
}
