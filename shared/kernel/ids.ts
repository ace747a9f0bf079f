import { v7 } from 'uuid';
import { z } from 'zod';

/** A new id, made where the thing is made (RFC 9562, version 7), so that a resend changes nothing. */
export const newId = (): string => v7();

export const idSchema = z.uuid('This is not a valid id.');
export const idParams = z.object({ id: idSchema });
