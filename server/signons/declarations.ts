import { fillWords } from '#shared/library/declaration.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Declaration } from '#shared/signons/signons.api.ts';
import { declarations } from '../library/templates.ts';

/** The declaration file of a profile; profiles are named place-variant, declarations by place. */
function fileOf(profileId: string) {
  const place = profileId.split('-')[0];
  const file = declarations().find(({ id, language }) => id === place && language === 'en');
  if (!file) throw new Error(`There is no declaration for the profile "${profileId}".`);
  return file;
}

export function statementDeclaration(
  profileId: string,
  values: { title: string; revision: string },
): Declaration {
  const { statement, language } = fileOf(profileId);
  return {
    id: statement.id,
    version: statement.version,
    language,
    words: fillWords(statement.words, values),
  };
}

export function talkDeclaration(profileId: string, values: { topic: string; date: string }): Declaration {
  const { talk, language } = fileOf(profileId);
  return { id: talk.id, version: talk.version, language, words: fillWords(talk.words, values) };
}

/** The declaration before its blanks are filled, as a talk's screen needs it to fill per talk. */
export function talkDeclarationWords(profileId: string): Declaration {
  const { talk, language } = fileOf(profileId);
  return { id: talk.id, version: talk.version, language, words: talk.words };
}

/** The privacy collection notice, shown before anything is collected. */
export function collectionNotice(profileId: string, values: { organisation: string; contact: string }) {
  const { notice } = fileOf(profileId);
  return { version: notice.version, paragraphs: fillWords(notice.paragraphs, values) };
}

/** Refuses words that are not the ones in force: nobody is recorded as having signed something else than was shown. */
export function requireDeclaration(
  shown: Pick<Declaration, 'id' | 'version' | 'language'>,
  known: Declaration,
): Declaration {
  if (shown.id === known.id && shown.version === known.version && shown.language === known.language)
    return known;
  throw new Refusal(
    'invalid',
    'The words to be signed have changed since this page was opened. Open it again and read them.',
    {
      fields: { declaration: 'These are not the words in force.' },
    },
  );
}
