import { z } from "zod";

/** The one list of roles; the database, the access control and the forms all read it. */
export const roles = ["owner", "designer", "reviewer", "manufacturer"] as const;
export const role = z.enum(roles);
export type Role = z.infer<typeof role>;

export const permissions = [
  "project:read",
  "project:create",
  "project:update",
  "draft:edit",
  "limits:set",
  "limits:propose",
  "run:start",
  "run:cancel",
  "review:flag",
  "review:comment",
  "review:waive",
  "review:sign",
  "release:create",
  "release:read",
  "note:read",
  "note:acknowledge",
  "team:read",
  "team:manage",
  "material:read",
  "material:edit",
  "audit:read",
] as const;
export type Permission = (typeof permissions)[number];

const designer: Permission[] = [
  "project:read",
  "project:create",
  "project:update",
  "draft:edit",
  "limits:propose",
  "run:start",
  "run:cancel",
  "review:flag",
  "review:comment",
  "release:read",
  "team:read",
  "material:read",
  "material:edit",
];
const reviewer: Permission[] = [
  "project:read",
  "limits:set",
  "limits:propose",
  "run:start",
  "run:cancel",
  "review:flag",
  "review:comment",
  "review:waive",
  "review:sign",
  "release:create",
  "release:read",
  "team:read",
  "material:read",
];

/** Owners hold the designer's and the reviewer's rights; a manufacturer sees only notes sent to them. */
const granted: Record<Role, ReadonlySet<Permission>> = {
  owner: new Set<Permission>([...designer, ...reviewer, "team:manage", "audit:read"]),
  designer: new Set(designer),
  reviewer: new Set<Permission>([...reviewer, "audit:read"]),
  manufacturer: new Set<Permission>(["note:read", "note:acknowledge"]),
};

/** Whether somebody of this role may do this at all; who may do it to *which* row is decided in the query. */
export function roleMay(of: Role, permission: Permission): boolean {
  return granted[of].has(permission);
}
