import type { Reading } from '#shared/signons/signons.api.ts';
import { Section } from './pieces.tsx';

/** The card before the steps: what changed since this person's last signature, the job, whom to ask, what to do in an emergency. */
export function OpeningCard({ reading, changeNote }: { reading: Reading; changeNote: string | null }) {
  return (
    <>
      <p className="text-ink-soft">
        {reading.documentTitle}, revision {reading.number}, for {reading.site}
      </p>
      {changeNote !== null && (
        <section className="mt-4 border-l-8 border-line bg-sheet py-3 pl-3 pr-2">
          <h2 className="mb-2 font-semibold text-line">What is different from what you signed</h2>
          <p>{changeNote || 'No note was written about what changed. Read every card again.'}</p>
        </section>
      )}
      {reading.job && (
        <Section title="The job">
          <p>{reading.job}</p>
        </Section>
      )}
      {reading.responsible && (
        <Section title="Who to ask">
          <p>{reading.responsible}</p>
        </Section>
      )}
      {reading.emergency && (
        <Section title="In an emergency">
          <p className="whitespace-pre-line">{reading.emergency}</p>
        </Section>
      )}
      {reading.caution && <p className="mt-5 text-ink-soft">{reading.caution}</p>}
    </>
  );
}
