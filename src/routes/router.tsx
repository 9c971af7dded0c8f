/** The rooms by address. Each is a chunk of its own, fetched when it is first entered. */
import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, redirect } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { sessionQuery } from '../api/session.ts';
import { signInPath } from './paths.ts';
import { RoomFault } from './RoomFault.tsx';
import { Root } from './Root.tsx';

/**
 * Lets in who is signed in and sends others to the sign-in page, which leads back here. Where the
 * session cannot be read, the room itself says so.
 */
function requireSession(client: QueryClient) {
  return async ({ request }: LoaderFunctionArgs) => {
    const session = await client.ensureQueryData(sessionQuery).catch(() => undefined);
    if (session && !session.person) {
      const { pathname, search } = new URL(request.url);
      // React Router's way to redirect is to throw the answer.
      // eslint-disable-next-line @typescript-eslint/only-throw-error
      throw redirect(signInPath(pathname + search));
    }
    return null;
  };
}

export function createRouter(client: QueryClient) {
  return createBrowserRouter([
    {
      Component: Root,
      ErrorBoundary: RoomFault,
      HydrateFallback: () => null,
      children: [
        { index: true, lazy: () => import('./front/FrontDoor.tsx') },
        { path: 'language', lazy: () => import('./language/LanguageReference.tsx') },
        {
          path: 'sign-in',
          children: [
            { index: true, lazy: () => import('./sign-in/SignIn.tsx') },
            { path: 'register', lazy: () => import('./sign-in/Register.tsx') },
            { path: 'forgotten', lazy: () => import('./sign-in/ForgottenPassword.tsx') },
          ],
        },
        // Where the links of mails lead.
        { path: 'confirm-email', lazy: () => import('./sign-in/ConfirmEmail.tsx') },
        { path: 'new-password', lazy: () => import('./sign-in/ResetPassword.tsx') },
        {
          loader: requireSession(client),
          ErrorBoundary: RoomFault,
          children: [
            { path: 'desk', lazy: () => import('./desk/DeskRoom.tsx') },
            { path: 'groups/:groupId', lazy: () => import('./group/GroupRoom.tsx') },
            { path: 'notebooks/:notebookId', lazy: () => import('./notebook/NotebookRoom.tsx') },
            {
              path: 'models/:modelId',
              lazy: () => import('./model/ModelFrame.tsx'),
              children: [
                {
                  index: true,
                  lazy: async () => ({
                    Component: (await import('../features/formulation/index.ts')).Formulation,
                  }),
                },
                {
                  path: 'properties',
                  lazy: async () => ({
                    Component: (await import('../features/properties/index.ts')).Properties,
                  }),
                },
                { path: 'versions', lazy: () => import('./versions/VersionsSection.tsx') },
                { path: 'versions/:number', lazy: () => import('./versions/VersionSection.tsx') },
              ],
            },
          ],
        },
        { path: '*', lazy: () => import('./NotFound.tsx') },
      ],
    },
  ]);
}
