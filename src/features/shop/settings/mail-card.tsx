import { Send } from 'lucide-react';
import { Link } from 'react-router-dom';
import { sendTestLetter, type ShopSettings } from '#contracts/shop-settings.ts';
import { paths } from '#src/app/paths.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';

/** How letters leave, as whoever runs the program has set it, and a letter to try it. */
export function MailCard({ mail }: { mail: NonNullable<ShopSettings['mail']> }) {
  const shop = useShop();
  const test = useSetUpWrite(sendTestLetter);
  return (
    <section className="card flex flex-col gap-3 p-4 sm:p-5">
      <h2>Mail</h2>
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
        <dt className="text-muted">Sent as</dt>
        <dd className="wrap-anywhere">{mail.from}</dd>
        <dt className="text-muted">By way of</dt>
        <dd className="wrap-anywhere">
          {mail.host ?? 'no mail server: letters wait'}
          {mail.localMailbox && ', kept in the local mailbox and sent to nobody'}
        </dd>
      </dl>
      <p className="text-muted">
        Server and sender are set where the program is started (SMTP_URL, MAIL_FROM), so that no password lies here.
      </p>
      <div className="flex flex-wrap items-center gap-3">
        <Button
          icon={<Send size={16} aria-hidden="true" />}
          busy={test.isPending}
          onClick={() => test.mutate({ params: { shopId: shop.id } })}
        >
          Send a test letter
        </Button>
        {test.data && (
          <p role="status">
            On its way to {test.data.to}.{' '}
            <Link to={paths.letters()} className="link">
              Letters sent
            </Link>{' '}
            says what became of it.
          </p>
        )}
      </div>
      {test.isError && <ErrorNote error={test.error} what="No letter was sent." />}
    </section>
  );
}
