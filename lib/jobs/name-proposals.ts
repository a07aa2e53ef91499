import "server-only";
import { getBindings, putBindings } from "@/lib/db/binding";
import { listNets, readNetChunks } from "@/lib/db/net";
import { patchNets, type NetPatch } from "@/lib/db/net-fields";
import { listParts } from "@/lib/db/part";
import { getDraft, type RevisionRef } from "@/lib/db/revision";
import { partKindOf } from "@/lib/formats/lists/parts-list";
import { proposeFromNames } from "@/lib/formats/net-names";
import type { Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import type { ConfirmedProposals, DraftProposals } from "@/lib/schemas/name-proposals";

/** What the names of a draft's nets suggest and nobody has settled yet, with the pins whose roles are to be set. */
export async function proposeForDraft(actor: Actor, projectId: string): Promise<DraftProposals> {
  const draft = await getDraft(actor, projectId);
  const [{ nets }, bindings] = await Promise.all([listNets(actor, draft), getBindings(actor, draft)]);
  const byName = new Map(nets.map((net) => [net.name, net]));
  const idOf = (name: string) => byName.get(name)?.id ?? "";
  const open = nets.filter(({ scope }) => scope !== "out");
  const { outOfScope, pairs, buses, matchGroups } = proposeFromNames(open.map(({ name }) => name));
  return {
    outOfScope: outOfScope.map((proposal) => ({ id: idOf(proposal.net), ...proposal })),
    pairs: pairs
      .filter(
        ({ positive, negative }) => !byName.get(positive)?.pairPartner && !byName.get(negative)?.pairPartner,
      )
      .map(({ name, positive, negative, how }) => ({
        name,
        how,
        positive: { id: idOf(positive), net: positive },
        negative: { id: idOf(negative), net: negative },
      })),
    buses: buses
      .filter(({ members }) => members.some(({ net }) => !byName.get(net)?.bus))
      .map(({ name, label, members }) => ({
        name,
        label,
        members: members.map(({ net, index }) => ({ id: idOf(net), index })),
      })),
    matchGroups: matchGroups
      .filter(({ nets: members }) => members.some((net) => !byName.get(net)?.matchGroup))
      .map(({ name, reason, nets: members }) => ({ name, reason, ids: members.map(idOf) })),
    bindings,
    pins: await readPins(actor, draft),
  };
}

/**
 * Writes what a person confirmed: scope, pairs, buses and match groups as one edit of the nets, roles as one edit of
 * the bindings; either can be undone.
 * @returns how many nets changed
 */
export async function confirmProposals(
  actor: Actor,
  projectId: string,
  confirmed: ConfirmedProposals,
): Promise<number> {
  const draft = await getDraft(actor, projectId);
  const names = new Map((await listNets(actor, draft)).nets.map(({ id, name }) => [id, name]));
  const nameOf = (id: string): string => {
    const name = names.get(id);
    if (name === undefined) throw new NotFoundError("One of these nets");
    return name;
  };
  const patches = new Map<string, NetPatch["fields"]>();
  const set = (id: string, fields: NetPatch["fields"]) => patches.set(id, { ...patches.get(id), ...fields });
  for (const { id, kind, reason } of confirmed.outOfScope)
    set(id, { scope: "out", scopeKind: kind, scopeReason: reason });
  for (const { positive, negative } of confirmed.pairs) {
    set(positive, { pair: { partner: nameOf(negative), polarity: "P" } });
    set(negative, { pair: { partner: nameOf(positive), polarity: "N" } });
  }
  for (const { name, members } of confirmed.buses)
    for (const { id, index } of members) set(id, { bus: { name, index } });
  for (const { name, ids } of confirmed.matchGroups) for (const id of ids) set(id, { matchGroup: name });
  const changes = [...patches].map(([id, fields]) => ({ id, fields }));
  const changed = changes.length === 0 ? 0 : await patchNets(actor, projectId, changes, summaryOf(confirmed));
  if (confirmed.bindings)
    await putBindings(actor, projectId, confirmed.bindings.version, confirmed.bindings.bindings);
  return changed;
}

function summaryOf({ outOfScope, pairs, buses, matchGroups }: ConfirmedProposals): string {
  const parts = [
    outOfScope.length > 0 && `${outOfScope.length} out of scope`,
    pairs.length > 0 && `${pairs.length} pairs`,
    buses.length > 0 && `${buses.length} buses`,
    matchGroups.length > 0 && `${matchGroups.length} match groups`,
  ].filter(Boolean);
  return `Confirmed from names: ${parts.join(", ")}`;
}

async function readPins(actor: Actor, draft: RevisionRef): Promise<DraftProposals["pins"]> {
  const parts = new Map((await listParts(actor, draft)).map((part) => [part.reference, part]));
  const nets: string[] = [];
  const references: DraftProposals["pins"]["references"] = [];
  const referenceIndex = new Map<string, number>();
  const pins: DraftProposals["pins"]["pins"] = [];
  for await (const chunk of readNetChunks(actor, draft))
    for (const net of chunk) {
      if (net.scope === "out") continue;
      const netIndex = nets.push(net.name) - 1;
      for (const { reference, pin, role } of net.topology.pins) {
        let index = referenceIndex.get(reference);
        if (index === undefined) {
          const part = parts.get(reference);
          const kind = part?.kind ?? partKindOf(reference);
          index = references.push({ reference, partNumber: part?.partNumber ?? "", kind }) - 1;
          referenceIndex.set(reference, index);
        }
        pins.push([netIndex, index, pin, role ?? ""]);
      }
    }
  return { nets, references, pins };
}
