import { queryOptions, useQuery } from '@tanstack/react-query';
import { getRegister } from '#shared/signons/register.api.ts';
import { getSite } from '#shared/sites/sites.api.ts';
import { getTalk, listTalks } from '#shared/talks/talks.api.ts';
import { call } from '../lib/call.ts';
import { crewToSign } from './crew-to-sign.ts';

/** Who of a site's crew has still to sign what; of one talk alone where one is named. */
const crewToSignQuery = (siteId: string, talkId: string | null) =>
  queryOptions({
    queryKey: ['register', 'crew-to-sign', siteId, talkId],
    queryFn: async () => {
      const site = await call(getSite, { params: { id: siteId } });
      if (talkId) {
        const talk = await call(getTalk, { params: { id: talkId } });
        return { members: crewToSign(site.people, [], [talk]), talk };
      }
      const { rows } = await call(getRegister, { query: { siteId } });
      const { talks } = await call(listTalks, { query: { siteId, state: 'open' } });
      const open = await Promise.all(talks.map(({ id }) => call(getTalk, { params: { id } })));
      return { members: crewToSign(site.people, rows, open), talk: null };
    },
  });

export const useCrewToSign = (siteId: string, talkId: string | null) =>
  useQuery(crewToSignQuery(siteId, talkId));
