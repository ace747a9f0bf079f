import type { Reading, ToSign } from '#shared/signons/signons.api.ts';
import type { Carrier, Outbox } from './outbox.ts';

/** What the signing of one person at one site needs of its surroundings: a worker's own phone, or a signed-in device. */
export type SignApi = {
  toSign: () => Promise<ToSign>;
  reading: (revisionId: string) => Promise<Reading>;
  carrier: Carrier;
  outbox: Outbox;
  /** The likely witness of a typed signature, where a supervisor holds the device. */
  witness?: string;
};
