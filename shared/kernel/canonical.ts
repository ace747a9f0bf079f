import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import canonicalize from 'canonicalize';

/** Canonical JSON after RFC 8785. Throws on what JSON cannot say (undefined at the top, NaN, infinities). */
export function canonicalJson(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new TypeError('This value has no JSON form.');
  return text;
}

/** SHA-256 (FIPS 180-4) as 64 lower-case hexadecimal digits. A string is hashed as UTF-8. */
export function sha256Hex(content: string | Uint8Array): string {
  return bytesToHex(sha256(typeof content === 'string' ? utf8ToBytes(content) : content));
}

/** The hash by which a frozen thing is known: SHA-256 of its canonical JSON. */
export const hashOf = (value: unknown): string => sha256Hex(canonicalJson(value));

/** The first ten digits, as printed on sheets. */
export const shortHash = (hash: string): string => hash.slice(0, 10);
