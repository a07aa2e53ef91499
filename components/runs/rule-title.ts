import { ruleCatalogue } from "@/lib/si/rules";

const TITLES = new Map(ruleCatalogue.map((rule) => [rule.id, rule.title]));

/** What a rule is called on screen; a rule of an older engine keeps its id. */
export const ruleTitle = (id: string) => TITLES.get(id) ?? id;
