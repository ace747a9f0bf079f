import { z } from 'zod';
import { talkQuery } from '#shared/talks/talks.api.ts';

const { siteId, personId, state, from, to, search } = talkQuery.shape;

/** What the URL asks of the talks; a value that they do not know is passed over. */
export const talkUrl = z.object({
  siteId: siteId.catch(undefined),
  personId: personId.catch(undefined),
  state: state.catch(undefined),
  from: from.catch(undefined),
  to: to.catch(undefined),
  search: search.catch(undefined),
});
