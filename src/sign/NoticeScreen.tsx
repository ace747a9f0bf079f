import { BigButton, Screen } from './pieces.tsx';

/** What is kept of a person and why, before anything is collected. */
export function NoticeScreen({ paragraphs, onAgree }: { paragraphs: string[]; onAgree: () => void }) {
  return (
    <Screen
      title="Before you give your name"
      actions={
        <BigButton className="grow text-[1.125rem]" onClick={onAgree}>
          I have read this, go on
        </BigButton>
      }
    >
      <div className="space-y-3 text-[1.125rem]">
        {paragraphs.map((paragraph) => (
          <p key={paragraph}>{paragraph}</p>
        ))}
      </div>
    </Screen>
  );
}
