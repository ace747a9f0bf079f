import { z } from 'zod';
import { registerQuery } from '#shared/signons/register.api.ts';

const { siteId, statementId, status, employerId, search, sort, direction } = registerQuery.shape;

/** What the URL asks of the register; a value that the register does not know is passed over. */
export const registerUrl = z.object({
  siteId: siteId.catch(undefined),
  statementId: statementId.catch(undefined),
  status: status.catch(undefined),
  employerId: employerId.catch(undefined),
  search: search.catch(undefined),
  sort: sort.catch('name'),
  direction: direction.catch('up'),
});
export type RegisterUrl = z.infer<typeof registerUrl>;
