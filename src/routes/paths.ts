/** The addresses of the rooms. */
const part = encodeURIComponent;

export const paths = {
  front: '/',
  language: '/language',
  signIn: '/sign-in',
  register: '/sign-in/register',
  forgotten: '/sign-in/forgotten',
  desk: '/desk',
  group: (groupId: string) => `/groups/${part(groupId)}`,
  notebook: (notebookId: string) => `/notebooks/${part(notebookId)}`,
  model: (modelId: string) => `/models/${part(modelId)}`,
  properties: (modelId: string) => `/models/${part(modelId)}/properties`,
  versions: (modelId: string) => `/models/${part(modelId)}/versions`,
  version: (modelId: string, number: number) => `/models/${part(modelId)}/versions/${number}`,
};

/** The sign-in page that leads back to where one was. */
export function signInPath(next: string): string {
  return next === paths.front || next === '' ? paths.signIn : `${paths.signIn}?next=${part(next)}`;
}

/** A place to go after sign-in, if it is one of ours: an address of another site is refused. */
export function safeNext(next: string | null): string {
  if (!next || !next.startsWith('/') || /^\/[/\\]/.test(next) || next.includes('\\')) {
    return paths.desk;
  }
  return next.startsWith(paths.signIn) ? paths.desk : next;
}
