import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { newId } from '#shared/kernel/ids.ts';
import { accounts, memberships, organisations } from '../account/account.table.ts';
import { hashPassword } from '../account/password.ts';
import { addShippedBlocks } from '../library/library.service.ts';
import { matrices, projectRoot } from '../library/templates.ts';
import { saveEmployer, savePerson } from '../people/people.service.ts';
import type { UserActor } from '../platform/actor.ts';
import type { Db } from '../platform/db.ts';
import { analyze } from '../platform/maintenance.ts';
import type { Platform } from '../platform/platform.ts';
import { putOnCrew, saveSite } from '../sites/sites.service.ts';
import { demoSignIns } from './demo-sign-ins.ts';
import { type Scenario, scenarioSchema } from './scenario.ts';
import { known, type Seeded } from './seeded.ts';
import { seedStatements } from './seed-statements.ts';
import { seedTalks } from './seed-talks.ts';

export async function isOrganisationThere(db: Db): Promise<boolean> {
  const rows = await db.select({ id: organisations.id }).from(organisations).limit(1);
  return rows.length > 0;
}

/** Makes the demo organisation through the services themselves, in one transaction; days are counted back from now. */
export async function seedDemo({ database }: Pick<Platform, 'database'>, now = new Date()): Promise<Seeded> {
  const scenario = scenarioSchema.parse(
    JSON.parse(readFileSync(join(projectRoot, 'templates/demo/scenario.json'), 'utf8')),
  );
  // Hashing is slow and stays outside the transaction.
  const signIns = await Promise.all(
    demoSignIns(projectRoot).map(async (signIn) => ({
      ...signIn,
      passwordHash: await hashPassword(signIn.password),
    })),
  );
  const seeded = await database.db.transaction(async (db) => {
    const orgId = await seedOrganisation(db, scenario);
    const sites = await seedSites(db, orgId, scenario);
    const people = await seedPeople(db, orgId, scenario, sites);
    const actors = new Map<string, UserActor>();
    for (const signIn of signIns)
      actors.set(signIn.role, await seedAccount(db, orgId, signIn, scenario, people, now));
    const made: Seeded = {
      orgId,
      scenario,
      sites,
      people,
      supervisor: known(actors, 'supervisor'),
      safetyOfficer: known(actors, 'safetyOfficer'),
      now,
    };
    await seedStatements(db, made);
    await seedTalks(db, made);
    return made;
  });
  await analyze(database);
  return seeded;
}

async function seedOrganisation(db: Db, { organisation }: Scenario): Promise<string> {
  const id = newId();
  const { matrixId, ...rest } = organisation;
  const matrix = matrices().find((candidate) => candidate.id === matrixId);
  if (!matrix) throw new Error(`There is no matrix "${matrixId}".`);
  await db.insert(organisations).values({ id, ...rest, matrix, invented: true });
  await addShippedBlocks(db, id);
  return id;
}

async function seedSites(db: Db, orgId: string, { sites }: Scenario): Promise<Map<string, string>> {
  const ids = new Map<string, string>();
  for (const { key, ...site } of sites) {
    const id = newId();
    ids.set(key, id);
    await saveSite(db, orgId, id, site);
  }
  return ids;
}

async function seedPeople(
  db: Db,
  orgId: string,
  scenario: Scenario,
  sites: Map<string, string>,
): Promise<Map<string, string>> {
  const employers = new Map<string, string>();
  for (const { key, ...employer } of scenario.employers) {
    const id = newId();
    employers.set(key, id);
    await saveEmployer(db, orgId, id, employer);
  }
  const ids = new Map<string, string>();
  for (const { key, employer, sites: on, ...person } of scenario.people) {
    const id = newId();
    ids.set(key, id);
    await savePerson(db, orgId, id, { ...person, contact: '', employerId: known(employers, employer) });
    for (const site of on) await putOnCrew(db, orgId, known(sites, site), id);
  }
  return ids;
}

type SignIn = ReturnType<typeof demoSignIns>[number] & { passwordHash: string };

async function seedAccount(
  db: Db,
  orgId: string,
  { role, email, name, passwordHash }: SignIn,
  scenario: Scenario,
  people: Map<string, string>,
  now: Date,
): Promise<UserActor> {
  const accountId = newId();
  const key = scenario.people.find((person) => person.name === name)?.key;
  const personId = key ? known(people, key) : null;
  await db.insert(accounts).values({ id: accountId, email, name, passwordHash });
  await db
    .insert(memberships)
    .values({ orgId, accountId, role: role as UserActor['role'], personId, joinedAt: now });
  return { kind: 'user', accountId, orgId, role: role as UserActor['role'], personId, name };
}
