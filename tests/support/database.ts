import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { migrate } from "drizzle-orm/libsql/migrator";
import { openDatabase, replaceDatabase, type Database, type OpenDatabase } from "@/lib/db/client";
import { newId } from "@/lib/db/ids";
import { member, organization, user } from "@/lib/db/schema";
import type { UserActor } from "@/lib/schemas/actor";
import { roles, type Role } from "@/lib/schemas/role";

export interface TestTeam {
  id: string;
  name: string;
  /** One person in each role. */
  actors: Record<Role, UserActor>;
}

export interface TestDatabase {
  db: Database;
  open: OpenDatabase;
  /** The folder of the database, for other files of the test; gone after close(). */
  folder: string;
  file: string;
  /** "Saltmarsh" and "Estuary": teams that must never see each other's things. */
  own: TestTeam;
  other: TestTeam;
  /** The same two, for tests that walk over them. */
  teams: readonly [TestTeam, TestTeam];
  close(): Promise<void>;
}

/**
 * A migrated database in a file of its own, with two teams of one person per role, that getDb() answers with
 * until close(). Call it in beforeAll or beforeEach, and close() in the matching after.
 */
export async function createTestDatabase(): Promise<TestDatabase> {
  const folder = await mkdtemp(path.join(tmpdir(), "ringfence-test-"));
  const file = path.join(folder, "ringfence.db");
  const open = await openDatabase(`file:${file}`);
  await migrate(open.db, { migrationsFolder: path.resolve("drizzle") });
  await replaceDatabase(open);
  const own = await makeTeam(open.db, "Saltmarsh");
  const other = await makeTeam(open.db, "Estuary");
  return {
    db: open.db,
    open,
    folder,
    file,
    own,
    other,
    teams: [own, other],
    close: async () => {
      await replaceDatabase(null);
      await rm(folder, { recursive: true, force: true });
    },
  };
}

async function makeTeam(db: Database, name: string): Promise<TestTeam> {
  const at = new Date();
  const id = newId();
  const slug = name.toLowerCase();
  const people = roles.map((role) => ({
    role,
    userId: newId(),
    name: `${name} ${role}`,
    email: `${role}@${slug}.example`,
  }));
  await db.batch([
    db.insert(organization).values({ id, name, slug, createdAt: at }),
    db.insert(user).values(
      people.map(({ userId, name, email }) => ({
        id: userId,
        name,
        email,
        emailVerified: true,
        createdAt: at,
        updatedAt: at,
      })),
    ),
    db
      .insert(member)
      .values(
        people.map(({ userId, role }) => ({ id: newId(), organizationId: id, userId, role, createdAt: at })),
      ),
  ]);
  const actors = Object.fromEntries(
    people.map((person): [Role, UserActor] => [person.role, { kind: "user", teamId: id, ...person }]),
  ) as Record<Role, UserActor>;
  return { id, name, actors };
}
