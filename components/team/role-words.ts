import { type Role, roles } from "@/lib/schemas/role";

/** What each role does here, in one line. */
export const ROLE_WORDS: Record<Role, string> = {
  owner: "Invites people, sets roles, and may do what designers and reviewers do.",
  designer: "Works on stackup, classes and nets, runs the checks, proposes waivers.",
  reviewer: "Sets limits, works problems, decides on waivers, signs a release.",
  manufacturer: "Sees only what was released or sent to them.",
};

export const ROLE_OPTIONS = roles.map((role) => ({ value: role, label: role }));
