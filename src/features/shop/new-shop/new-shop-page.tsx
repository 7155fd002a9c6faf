import { useNavigate } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { useShopChoice } from '#src/lib/session.ts';
import { Page } from '#src/ui/page.tsx';
import { NewShopForm } from './new-shop-form.tsx';

export function Component() {
  const { choose } = useShopChoice();
  const navigate = useNavigate();
  return (
    <Page title="Open another shop" width="text">
      <p>
        It begins empty, with you as its owner; the first steps lead to its first plan. Your other shops stay as they
        are.
      </p>
      <NewShopForm
        onOpened={(shopId) => {
          choose(shopId);
          void navigate(paths.firstSteps());
        }}
      />
    </Page>
  );
}
