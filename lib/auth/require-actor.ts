import "server-only";
import type { Route } from "next";
import { headers } from "next/headers";
import { notFound, redirect } from "next/navigation";
import { cache } from "react";
import type { UserActor } from "@/lib/schemas/actor";
import { roleMay, type Permission } from "@/lib/schemas/role";
import { readSigned, type Signed } from "./session";

/** Who looks at this page; null where nobody is signed in. Read once for each answer. */
export const currentSigned = cache(async (): Promise<Signed | null> => readSigned(await headers()));

/** Somebody signed in, with or without a team; whoever is not goes to sign in and comes back. */
export async function requireSigned(): Promise<Signed> {
  const signed = await currentSigned();
  if (signed) return signed;
  const address = (await headers()).get("x-address");
  redirect((address ? `/sign-in?next=${encodeURIComponent(address)}` : "/sign-in") as Route);
}

/**
 * The actor of this page. Signed out, they go to sign in; without a team, to make one; without the permission, the
 * page does not exist.
 */
export async function requireActor(permission?: Permission): Promise<UserActor> {
  const { actor } = await requireSigned();
  if (!actor) redirect("/create-team");
  if (permission && !roleMay(actor.role, permission)) notFound();
  return actor;
}
