import { formatDay } from '#shared/kernel/work-date.ts';
import { newId } from '#shared/kernel/ids.ts';
import type { Db } from '../platform/db.ts';
import { talkDeclaration } from '../signons/declarations.ts';
import { attend } from '../signons/signons.service.ts';
import { closeTalk } from '../talks/close.service.ts';
import { saveTalk } from '../talks/talks.service.ts';
import { dayOf, daysBefore, known, type Seeded } from './seeded.ts';
import { inventedSignature, nameOf, signingOf } from './seed-statements.ts';

export async function seedTalks(db: Db, seeded: Seeded): Promise<void> {
  const zone = seeded.scenario.organisation.timeZone;
  for (const { site, daysAgo, attendance, closed, actions, ...talk } of seeded.scenario.talks) {
    const id = newId();
    const at = daysBefore(seeded.now, daysAgo);
    const siteId = known(seeded.sites, site);
    const date = dayOf(at, zone);
    const saved = await saveTalk(db, seeded.supervisor, id, {
      ...talk,
      siteId,
      date,
      minutes: 10,
      representativePresent: false,
      actions: actions.map(({ dueInDays, ...action }) => ({
        id: newId(),
        ...action,
        dueDate: dayOf(daysBefore(at, -dueInDays), zone),
      })),
      lockVersion: 0,
    });
    const declaration = talkDeclaration(seeded.scenario.organisation.profileId, {
      topic: talk.topic,
      date: formatDay(date),
    });
    for (const person of attendance) {
      await attend(
        db,
        signingOf(seeded, siteId, person, false),
        newId(),
        {
          talkId: id,
          signature: { method: 'drawn', drawn: inventedSignature(nameOf(seeded, person)) },
          declaration: { id: declaration.id, version: declaration.version, language: 'en' },
          signedAt: at.toISOString(),
          language: 'en',
        },
        at,
      );
    }
    if (closed) await closeTalk(db, seeded.supervisor, id, saved.lockVersion, at);
  }
}
