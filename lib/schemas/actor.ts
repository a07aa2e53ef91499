import { roleMay, type Permission, type Role } from "./role";

/** A signed-in person in the team they work in now. */
export interface UserActor {
  kind: "user";
  userId: string;
  teamId: string;
  role: Role;
  email: string;
  name: string;
}

/** The program itself, for one team: resumes runs and imports, makes demo data. Never made from a request. */
export interface SystemActor {
  kind: "system";
  userId: "system";
  teamId: string;
  role: "owner";
  email: "";
  name: "Ringfence";
}

export type Actor = UserActor | SystemActor;

export const systemActor = (teamId: string): SystemActor => ({
  kind: "system",
  userId: "system",
  teamId,
  role: "owner",
  email: "",
  name: "Ringfence",
});

/** Whether the actor's role allows it; the row's team is decided in the query. */
export function can(actor: Actor, permission: Permission): boolean {
  return roleMay(actor.role, permission);
}
