/** What rooms and features use of the API, by resource. Components never fetch by themselves. */
export * from './session.ts';
export * from './desk.ts';
export * from './waiting.ts';
export * from './groups.ts';
export * from './notebooks.ts';
export * from './models.ts';
export * from './versions.ts';
export * from './derivationEvents.ts';
export { ProblemError, isProblem, describeFault } from './problem.ts';
export { commandWhileLeaving } from './request.ts';
export { createQueryClient, keys } from './queryClient.ts';
