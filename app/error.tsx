'use client';

import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { PageHead } from '@/components/ui/section';

interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

export default function ErrorPage({ error, reset }: ErrorPageProps) {
  return (
    <main className="mx-auto grid max-w-160 content-start gap-8 px-4 py-8 sm:px-6">
      <PageHead title="This page could not be shown" />
      <Banner
        severity="blocker"
        word="Failed"
        live
        action={
          <Button kind="primary" onClick={reset}>
            Load it again
          </Button>
        }
      >
        <p>The server met an error while making this page. Nothing that was saved is lost.</p>
        {error.digest ? (
          <p>
            If it happens again, tell your administrator this code: <code>{error.digest}</code>
          </p>
        ) : null}
      </Banner>
    </main>
  );
}
