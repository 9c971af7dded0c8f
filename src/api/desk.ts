/** The desk: what waits for a person, and everything within reach. */
import { queryOptions, useQuery } from '@tanstack/react-query';
import { deskSchema } from '../../shared/contracts/models.ts';
import { keys } from './queryClient.ts';
import { request } from './request.ts';
import { runningJobs } from './waiting.ts';

export const deskQuery = queryOptions({
  queryKey: keys.desk,
  queryFn: ({ signal }) => request(deskSchema, '/api/desk', { signal }),
  // The desk asks again while derivations run or wait.
  refetchInterval: (query) =>
    query.state.data && runningJobs(query.state.data).length > 0 ? 2000 : 60_000,
});

export function useDesk() {
  return useQuery(deskQuery);
}
