import type { StoredBinding, StoredModel } from "./model";
import type { NeighbourDoc, StoredNet, StoredPart } from "./net";
import type { StoredNetClass } from "./net-class";
import type { StoredRuleSet } from "./rule-set";
import type { StoredStackup } from "./stackup";

/** Everything a check reads of a revision; what a run and a release freeze. */
export interface RevisionInputs {
  schema: 1;
  project: { name: string; unit: "mm" | "mil" };
  revision: string;
  stackup: StoredStackup;
  classes: StoredNetClass[];
  models: StoredModel[];
  bindings: StoredBinding[];
  ruleSet: StoredRuleSet;
  parts: StoredPart[];
  nets: StoredNet[];
  neighbours: NeighbourDoc[];
}
