import { type Metadata } from 'next';
import { mailWishOf } from '@/db/queries/people';
import { listProgramsOf } from '@/db/queries/programs';
import { listSessions } from '@/db/queries/sessions';
import { listTokens } from '@/db/queries/tokens';
import { MailWishForm } from '@/components/account/mail-wish-form';
import { PasswordForm } from '@/components/account/password-form';
import { TokenForm } from '@/components/account/token-form';
import { TokenTable } from '@/components/account/token-table';
import { OneButtonForm } from '@/components/forms/one-button-form';
import { Day } from '@/components/ui/day';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { requireUser } from '@/lib/server/http/page';
import { scopesWithin } from '@/lib/token-scopes';
import { WorkspaceFrame } from '../frame';
import {
  changePasswordAction,
  makeTokenAction,
  revokeTokenAction,
  setMailWishAction,
  signOutEverywhereAction,
} from './actions';

export const metadata: Metadata = { title: 'Account' };

export default async function AccountPage() {
  const { user } = await requireUser('account.keep');
  const now = new Date();
  const [programs, tokens, sessions, mailWish] = await Promise.all([
    listProgramsOf(serverDb(), user.id),
    listTokens(serverDb(), user.id),
    listSessions(serverDb(), user.id, now),
    mailWishOf(serverDb(), user.id),
  ]);
  return (
    <WorkspaceFrame user={user}>
      <PageHead title={user.name} lead={user.email} />
      <Section
        title="Tokens"
        lead="A token lets a program of yours use the API in your name. It can do no more than your roles allow at that moment."
      >
        {tokens.length === 0 ? (
          <EmptyPlace title="You have no tokens">
            <p>A simulator or a script that reads or uploads through the API needs one. Make it below.</p>
          </EmptyPlace>
        ) : (
          <TokenTable tokens={tokens} now={now} revoke={revokeTokenAction} />
        )}
      </Section>
      <Section title="Make a token">
        <TokenForm
          action={makeTokenAction}
          scopes={scopesWithin(programs)}
          programs={programs.map(({ code, title }) => ({ code, title }))}
          appUrl={env().APP_URL}
        />
      </Section>
      <Section title="Mail">
        <MailWishForm action={setMailWishAction} wish={mailWish} />
      </Section>
      <Section
        title="Password"
        lead="A change ends every other session. Tokens go on working until they are revoked."
      >
        <PasswordForm action={changePasswordAction} />
      </Section>
      <Section
        title="Sessions"
        lead="Where you are signed in. A session ends after 8 hours without use, and after 7 days."
      >
        <Table caption="Your sessions" captionHidden>
          <thead>
            <tr>
              <ColumnHead>Began</ColumnHead>
              <ColumnHead>From</ColumnHead>
            </tr>
          </thead>
          <tbody>
            {sessions.map((session) => (
              <tr key={session.startedAt.toISOString()}>
                <RowHead>
                  <Day at={session.startedAt} time />
                </RowHead>
                <Cell className="font-mono">{session.address}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
        <OneButtonForm
          action={signOutEverywhereAction}
          fields={{}}
          words="Sign out everywhere"
          pendingWords="Signing out"
          kind="secondary"
        />
      </Section>
    </WorkspaceFrame>
  );
}
