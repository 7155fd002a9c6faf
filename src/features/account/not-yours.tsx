import { Page } from '#src/ui/page.tsx';

/** A page that one's role does not open; the server would refuse it as well. */
export const NotYours = ({ title }: { title: string }) => (
  <Page title={title} width="text">
    <p>Only owners of the shop see this page. Ask one of them if you need something from it.</p>
  </Page>
);
