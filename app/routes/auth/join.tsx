import { choosePassword, loadPasswordLink } from '#app/features/auth/choose-password.server.ts';
import { ChoosePassword } from '#app/features/auth/components/choose-password.tsx';
import type { Route } from './+types/join.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Welcome: choose a password · Weepmark' }];

export function loader({ params }: Route.LoaderArgs) {
  return loadPasswordLink(params.token, 'join');
}

export function action({ request, params }: Route.ActionArgs) {
  return choosePassword(request, params.token, 'join');
}

export default function Join({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <ChoosePassword
      title="Welcome: choose a password"
      person={loaderData.person}
      fields={actionData?.fields ?? {}}
    />
  );
}
