import { Arguments } from "./arguments.js";
import type { ExcelHost } from "./excel-host.js";
import { HostError, itemNotFound, notModelled } from "./host-error.js";
import type { Opened } from "./kind.js";
import { kindOf } from "./kinds/index.js";
import { query } from "./query.js";
import { isSupported, requirementOf } from "./requirement-sets.js";
import { ACTION, PATH, type WireAction, type WireArguments, type WirePath, type WireReply, type WireRequest } from "./wire.js";

/** One synchronisation: opens the objects that it names and carries out its actions one by one, up to the first that fails. */
export class Request {
  private readonly objects = new Map<number, Opened | null>();
  /** the member at work, by which an error says where it happened */
  private location = "";

  constructor(
    private readonly host: ExcelHost,
    private readonly wire: WireRequest,
    private readonly root: Opened,
  ) {}

  /** What was done before a failure stays done, as in Excel. */
  perform(): WireReply {
    const reply: WireReply = { Results: [], TraceIds: [] };
    for (const [index, action] of this.wire.Actions.entries()) {
      try {
        if (action.ActionType === ACTION.trace) reply.TraceIds.push(action.Id);
        reply.Results.push({ ActionId: action.Id, Value: action.ActionType === ACTION.trace ? null : this.act(action) });
      } catch (reason) {
        if (!(reason instanceof HostError)) throw reason;
        const error = { Code: reason.code, Message: reason.message, ActionIndex: index, Location: this.location, HttpStatusCode: 400 };
        this.host.refused.push({ code: reason.code, message: reason.message });
        return { ...reply, Error: error };
      }
    }
    return reply;
  }

  private act(action: WireAction): unknown {
    if (action.ActionType === ACTION.instantiate) return this.instantiate(action.ObjectPathId);
    const object = this.object(action.ObjectPathId);
    if (object === null) {
      if (action.ActionType === ACTION.query || action.Name === "_KeepReference") return null;
      throw itemNotFound(`${action.Name} of a null object`);
    }
    const member = lowerFirst(action.Name);
    this.begin(object, member);
    switch (action.ActionType) {
      case ACTION.query:
        return query(object, action.QueryInfo ?? {}, this.host);
      case ACTION.set:
        return this.set(object, member, this.values(action.ArgumentInfo));
      case ACTION.method:
        return this.call(object, member, this.values(action.ArgumentInfo), action.ObjectPathId);
      default:
        throw notModelled(`actions of type ${action.ActionType}`);
    }
  }

  private instantiate(id: number): unknown {
    const object = this.object(id);
    if (object === null) return null;
    const reference = this.host.references.idOf(object);
    const own = kindOf(object).id?.(object.target);
    return { ...(own === undefined ? {} : { _Id: own }), ...(reference === undefined ? {} : { _ReferenceId: reference }) };
  }

  private object(id: number): Opened | null {
    const known = this.objects.get(id);
    if (known !== undefined) return known;
    const path = this.wire.ObjectPaths[String(id)];
    if (path === undefined) throw new HostError("InvalidObjectPath", `The request names no object ${id}.`);
    const object = this.open(path);
    this.objects.set(id, object);
    return object;
  }

  private open(path: WirePath): Opened | null {
    switch (path.ObjectPathType) {
      case PATH.root:
        return this.root;
      case PATH.service:
        return this.host.service(path.Name);
      case PATH.reference:
        return this.host.references.get(path.Name);
      case PATH.none:
        return null;
    }
    const parent = this.object(path.ParentObjectPathId ?? -1);
    // whatever is asked of a null object is a null object
    if (parent === null) return null;
    const given = this.values(path.ArgumentInfo);
    if (path.ObjectPathType === PATH.indexer) return this.item(parent, given);
    const member = lowerFirst(path.Name);
    this.begin(parent, member);
    const opens = kindOf(parent).open?.[member];
    if (opens === undefined) throw unknown(parent, member);
    this.requireSet(parent, member);
    const args = new Arguments(`${parent.kind}.${member}`, given);
    const object = opens(parent.target, args, this.host);
    args.refuseRest();
    return object;
  }

  private item(parent: Opened, given: readonly unknown[]): Opened {
    this.begin(parent, "getItem");
    const { item } = kindOf(parent);
    if (item === undefined || given.length !== 1) throw unknown(parent, "getItem");
    return item(parent.target, given[0], this.host);
  }

  private set(object: Opened, member: string, given: readonly unknown[]): null {
    const sets = kindOf(object).set?.[member];
    if (sets === undefined) throw unknown(object, member);
    this.requireSet(object, member);
    sets(object.target, given[0], this.host);
    return null;
  }

  private call(object: Opened, member: string, given: readonly unknown[], pathId: number): unknown {
    if (member === "_KeepReference") {
      this.host.references.keep(object);
      return null;
    }
    const calls = kindOf(object).call?.[member];
    if (calls === undefined) throw unknown(object, member);
    this.requireSet(object, member);
    const args = new Arguments(`${object.kind}.${member}`, given);
    const value = calls(object.target, args, this.host) ?? null;
    args.refuseRest();
    // an object that was asked for before may be another one now
    if (member === "delete") this.objects.delete(pathId);
    return value;
  }

  private begin({ kind }: Opened, member: string): void {
    this.location = `${kind}.${member}`;
    this.host.faults.beforeAction(this.location);
  }

  private requireSet({ kind }: Opened, member: string): void {
    const name = `${kind}.${member}`;
    if (isSupported(name, this.host.sets)) return;
    const { set, version } = requirementOf(name)!;
    throw new HostError("ApiNotFound", `The API you are trying to use could not be found. It may be available in a newer version of Excel (${name} came with ${set} ${version}).`);
  }

  private values(info: WireArguments | undefined): readonly unknown[] {
    return (info?.Arguments ?? []).map((value, index) => this.resolved(value, info?.ReferencedObjectPathIds?.[index] ?? 0));
  }

  private resolved(value: unknown, mark: unknown): unknown {
    if (typeof mark === "number" && mark !== 0) return this.object(mark);
    if (Array.isArray(value)) return value.map((each: unknown, index) => this.resolved(each, Array.isArray(mark) ? mark[index] : 0));
    if (typeof value === "object" && value !== null) {
      if ("_ObjectPathId" in value) return this.object(Number(value._ObjectPathId));
      return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, this.resolved(each, 0)]));
    }
    return value;
  }
}

function unknown({ kind }: Opened, member: string): HostError {
  return notModelled(`${kind}.${member}`);
}

function lowerFirst(name: string): string {
  return name.startsWith("_") ? name : name.slice(0, 1).toLowerCase() + name.slice(1);
}
