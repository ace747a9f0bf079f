import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { canonicalJson, hashOf, sha256Hex } from '#shared/kernel/canonical.ts';

type Example = {
  id: string;
  topic: string;
  source: string;
  inputs: Record<string, unknown>;
  expected: unknown;
};
const examples = JSON.parse(
  readFileSync(new URL('./calc-examples.json', import.meta.url), 'utf8'),
) as Example[];
const about = (topic: string) => examples.filter((example) => example.topic === topic);

describe('canonical JSON gives RFC 8785’s own test vectors', () => {
  const documents = about('JCS RFC 8785').filter(({ inputs }) => 'json' in inputs);
  test.each(documents)('$id ($source)', ({ inputs, expected }) => {
    const { canonical, sha256 } = expected as { canonical: string; sha256: string };
    const value = JSON.parse(inputs.json as string) as unknown;

    expect(canonicalJson(value)).toBe(canonical);
    expect(hashOf(value)).toBe(sha256);
  });

  test('numbers (RFC 8785 appendix B, given as IEEE 754 bits)', () => {
    const numbers = about('JCS RFC 8785').find(({ id }) => id === 'jcs-numbers');
    const values = (numbers?.inputs.ieee_hex as string[]).map((bits) =>
      Buffer.from(bits, 'hex').readDoubleBE(),
    );

    expect(values.map((value) => canonicalJson(value))).toEqual(numbers?.expected);
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])(
    '%s has no JSON form and is refused',
    (value) => {
      expect(() => canonicalJson({ value })).toThrow();
    },
  );
});

describe('SHA-256 gives the published examples of FIPS 180-4', () => {
  test.each(about('hash'))('$id ($source)', ({ inputs, expected }) => {
    const message = inputs.message === 'a x 1000000' ? 'a'.repeat(1_000_000) : (inputs.message as string);

    expect(sha256Hex(message)).toBe(expected);
  });
});
