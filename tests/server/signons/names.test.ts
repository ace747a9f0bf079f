import { expect, test } from 'vitest';
import { nameBegins, nameHolds } from '../../../server/signons/names.ts';

test.each([
  ['Nguyễn Thị Đào', 'nguyen'],
  ['Nguyễn Thị Đào', 'DAO ngu'],
  ['João Pinheiro', 'joao'],
  ['João Pinheiro', '  pin   jo '],
  ['Kit Marlowe-Hale', 'marlowe-h'],
  // The same letter as one sign or as letter and accent (Unicode normal forms C and D).
  ['Tom\u00e1s Arriaga', 'Toma\u0301s'],
])('%s is found by the beginnings of words: “%s”', (name, written) => {
  expect(nameBegins(name, written)).toBe(true);
});

test.each([
  ['João Pinheiro', 'inheiro'],
  ['João Pinheiro', 'joao costa'],
  ['Bree Ashcombe', ''],
  ['Bree Ashcombe', '   '],
  ['Bree Ashcombe', '\u0301\u0301\u0301'],
])('%s is not found by “%s”', (name, written) => {
  expect(nameBegins(name, written)).toBe(false);
});

test('a name holds what stands inside it, with or without accents', () => {
  expect(nameHolds('João Pinheiro', 'NHEI')).toBe(true);
  expect(nameHolds('João Pinheiro', 'ao p')).toBe(true);
  expect(nameHolds('João Pinheiro', 'kit')).toBe(false);
});
