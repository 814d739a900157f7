import { choosePassword, loadPasswordLink } from '#app/features/auth/choose-password.server.ts';
import { ChoosePassword } from '#app/features/auth/components/choose-password.tsx';
import type { Route } from './+types/reset.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Choose a new password · Weepmark' }];

export function loader({ params }: Route.LoaderArgs) {
  return loadPasswordLink(params.token, 'reset');
}

export function action({ request, params }: Route.ActionArgs) {
  return choosePassword(request, params.token, 'reset');
}

export default function Reset({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <ChoosePassword
      title="Choose a new password"
      person={loaderData.person}
      fields={actionData?.fields ?? {}}
    />
  );
}
