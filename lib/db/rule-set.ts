import "server-only";
import { and, eq, sql } from "drizzle-orm";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import { ruleSetDoc, type RuleSetDoc, type StoredRuleSet } from "@/lib/schemas/rule-set";
import { within } from "./access";
import { getDb } from "./client";
import { changeThing, differingFields, type DraftThing } from "./draft-thing";
import { getDraft, type RevisionRef } from "./revision";
import { ruleSet } from "./schema";

/** @throws NotFoundError */
export async function getRuleSet(actor: Actor, revision: Pick<RevisionRef, "id">): Promise<StoredRuleSet> {
  const db = await getDb();
  const [row] = await db
    .select()
    .from(ruleSet)
    .where(and(within(actor, "project:read", ruleSet.teamId), eq(ruleSet.revisionId, revision.id)));
  if (!row) throw new NotFoundError("This rule set");
  return { ...row.doc, version: row.version };
}

/** Sets the project's limits: a reviewer's right. @throws ConflictError */
export async function putRuleSet(
  actor: Actor,
  projectId: string,
  readVersion: number,
  input: RuleSetDoc,
): Promise<StoredRuleSet> {
  const draft = await getDraft(actor, projectId, "limits:set");
  const after = ruleSetDoc.parse(input);
  const reading = await ruleSetThing.read(actor, draft, null, null);
  const changed = ruleSetThing.describe(reading.state, after);
  const more = changed.length > 3 ? ` and ${changed.length - 3} more` : "";
  await changeThing(actor, draft, ruleSetThing, {
    entityId: null,
    reading,
    readVersion,
    after,
    summary: `Rules: ${changed.slice(0, 3).join(", ")}${more}`,
  });
  return getRuleSet(actor, draft);
}

export const ruleSetThing: DraftThing<RuleSetDoc> = {
  entity: "rules",
  what: "The rule set",
  parse: (stored) => (stored === null ? null : ruleSetDoc.parse(stored)),
  read: async (actor, draft) => {
    const { version, ...state } = await getRuleSet(actor, draft);
    return {
      state,
      version,
      unchanged: [
        sql`exists (select 1 from ${ruleSet} where ${ruleSet.revisionId} = ${draft.id} and ${ruleSet.version} = ${version})`,
      ],
    };
  },
  write: (db, draft, _entityId, state, version) => {
    if (!state) throw new Error("A revision always has a rule set.");
    return [
      db
        .update(ruleSet)
        .set({ doc: state, version })
        .where(and(eq(ruleSet.revisionId, draft.id), eq(ruleSet.teamId, draft.teamId))),
    ];
  },
  mayChange: (actor) => {
    if (!can(actor, "limits:set")) throw new NotFoundError("This rule set");
  },
  describe: (before, after) => {
    const changed = differingFields(before?.rules ?? null, after?.rules ?? null).map((rule) =>
      rule.replaceAll("-", " "),
    );
    if (before?.judgedAt !== after?.judgedAt) changed.push("where receivers are judged");
    return changed;
  },
};
