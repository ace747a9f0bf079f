import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { canonicalJson } from '#shared/kernel/canonical.ts';
import {
  chainVerifier,
  commitmentOf,
  entryHash,
  genesisHash,
  type LedgerEntry,
  nextEntry,
} from '#shared/ledger/chain.ts';

type Kept = { entry: LedgerEntry; salt: string; payload: unknown };

function chainOf(payloads: unknown[]): Kept[] {
  let previous: LedgerEntry | null = null;
  return payloads.map((payload, index) => {
    const salt = `salt ${index}`;
    const entry: LedgerEntry = nextEntry(previous, {
      at: new Date(Date.UTC(2026, 0, 1, 6, index)).toISOString(),
      kind: 'signOn',
      actor: `person:${index}`,
      subject: `signOn:${index}`,
      commitment: commitmentOf(salt, payload),
    });
    previous = entry;
    return { entry, salt, payload };
  });
}

function messagesOf(chain: Kept[]): string[] {
  const verifier = chainVerifier();
  return chain.flatMap(({ entry, salt, payload }) =>
    verifier.check(entry, { salt, payload }).map(({ message }) => message),
  );
}

const five = () => chainOf([{ n: 1 }, { n: 2 }, { n: 3 }, { n: 4 }, { n: 5 }]);

/** Changes one entry as somebody would who also makes its own hash good. */
const reforged = ({ entry, ...kept }: Kept, change: Partial<LedgerEntry>): Kept => {
  const bent = { ...entry, ...change };
  return { ...kept, entry: { ...bent, hash: entryHash(bent) } };
};

describe('the chain', () => {
  test('an entry’s hash is SHA-256 of its canonical form without the hash, worked out here by Node’s own', () => {
    const [first, second] = chainOf([{ a: 1 }, { b: 2 }]);
    const { hash, ...rest } = (second as Kept).entry;

    expect(hash).toBe(createHash('sha256').update(canonicalJson(rest)).digest('hex'));
    expect(rest.previous).toBe(first?.entry.hash);
    expect(first?.entry.previous).toBe(genesisHash);
    expect([first?.entry.sequence, rest.sequence]).toEqual([1, 2]);
  });

  test('a commitment depends on salt and payload, not on the order of the payload’s names', () => {
    expect(commitmentOf('s', { a: 1, b: 2 })).toBe(commitmentOf('s', { b: 2, a: 1 }));
    expect(commitmentOf('s', { a: 1 })).not.toBe(commitmentOf('t', { a: 1 }));
    expect(commitmentOf('s', { a: 1 })).not.toBe(commitmentOf('s', { a: 2 }));
    expect(commitmentOf('s', { a: 1 })).toBe(createHash('sha256').update('s{"a":1}').digest('hex'));
  });

  test('any chain as it was written holds, and ends at its last entry', () => {
    fc.assert(
      fc.property(fc.array(fc.jsonValue(), { maxLength: 12 }), (payloads) => {
        const chain = chainOf(payloads);
        const verifier = chainVerifier();
        for (const { entry, salt, payload } of chain)
          expect(verifier.check(entry, { salt, payload })).toEqual([]);
        expect(verifier.head()).toEqual({
          sequence: payloads.length,
          hash: chain.at(-1)?.entry.hash ?? genesisHash,
        });
      }),
    );
  });

  test('any field of any entry that is changed is found', () => {
    const fields = ['at', 'kind', 'actor', 'subject', 'commitment', 'previous', 'hash'] as const;
    fc.assert(
      fc.property(fc.nat(4), fc.constantFrom(...fields), (at, field) => {
        const chain = five();
        const kept = chain[at] as Kept;
        kept.entry = { ...kept.entry, [field]: `${kept.entry[field]}x` };

        expect(messagesOf(chain)).toContain(`Entry ${at + 1} was altered.`);
      }),
    );
  });
});

describe('a chain that was bent', () => {
  test('an entry taken from the middle is missed', () => {
    expect(messagesOf(five().toSpliced(2, 1))).toEqual([
      'Entry 3 is missing: entry 4 stands in its place.',
      'Entry 4 does not follow from the entry before it.',
    ]);
  });

  test('an entry that was altered and hashed anew breaks the link after it', () => {
    const chain = five();
    chain[1] = reforged(chain[1] as Kept, { actor: 'person:other' });

    expect(messagesOf(chain)).toEqual(['Entry 3 does not follow from the entry before it.']);
  });

  test('two entries that changed places are found', () => {
    const [a, b, c, d, e] = five() as [Kept, Kept, Kept, Kept, Kept];

    expect(messagesOf([a, c, b, d, e]).length).toBeGreaterThan(1);
  });

  test('a payload that was swapped is found', () => {
    const chain = five();
    (chain[3] as Kept).payload = { n: 99 };

    expect(messagesOf(chain)).toEqual(['The record kept with entry 4 is not the one that was entered.']);
  });

  test('a payload that was erased after its time leaves a chain that still holds', () => {
    const verifier = chainVerifier();

    expect(five().flatMap(({ entry }) => verifier.check(entry, null))).toEqual([]);
  });
});
