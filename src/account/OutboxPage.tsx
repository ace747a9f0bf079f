import { queryOptions, useQuery } from '@tanstack/react-query';
import { readOutbox } from '#shared/account/account.api.ts';
import { call } from '../lib/call.ts';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';

const outboxQuery = queryOptions({
  queryKey: ['outbox'],
  queryFn: () => call(readOutbox, {}),
  refetchInterval: 3_000,
});

/** What a server without a mail host kept instead of sending. */
export function OutboxPage() {
  const query = useQuery(outboxQuery);
  return (
    <Page
      title="Development outbox"
      lead="This server has no mail host: what it would have sent is kept here, and can be read at this machine only."
    >
      <Loaded query={query}>
        {({ mails }) =>
          mails.length === 0 ? (
            <p className="text-ink-soft">Nothing has been sent yet.</p>
          ) : (
            <ul className="flex flex-col gap-4">
              {mails.map(({ id, to, subject, text, createdAt }) => (
                <li key={id} className="border border-zinc bg-sheet p-4">
                  <h2>{subject}</h2>
                  <p className="text-sm text-ink-soft">
                    To {to}, {new Date(createdAt).toLocaleString()}
                  </p>
                  <p className="mt-2 break-words whitespace-pre-line">{withLinks(text)}</p>
                </li>
              ))}
            </ul>
          )
        }
      </Loaded>
    </Page>
  );
}

function withLinks(text: string) {
  return text.split(/(https?:\/\/\S+)/).map((part, index) =>
    part.startsWith('http') ? (
      <a key={index} href={part}>
        {part}
      </a>
    ) : (
      part
    ),
  );
}
