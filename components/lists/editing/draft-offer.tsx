'use client';

import { useRouter } from 'next/navigation';
import { counted } from '@/components/lists/list-words';
import { OthersAtWork } from '@/components/lists/editing/others-at-work';
import { ThrowAway } from '@/components/lists/editing/throw-away';
import { usePresence } from '@/components/lists/editing/use-presence';
import { Banner } from '@/components/ui/banner';
import { ButtonLink } from '@/components/ui/button';
import { Day } from '@/components/ui/day';
import { type Presence } from '@/lib/contracts/list-draft';

interface DraftOfferProps {
  readonly start: Presence;
  /** The list's internal route, and its page. */
  readonly route: string;
  readonly listHref: string;
}

/** On the page of a list: one's own draft to go on with, and who else has one. */
export function DraftOffer({ start, route, listHref }: DraftOfferProps) {
  const router = useRouter();
  const { mine, others, newest } = usePresence(route, start);
  return (
    <>
      {mine === null ? null : (
        <Banner
          severity="note"
          word="Draft"
          title={
            <>
              Your draft of <Day at={new Date(mine.changedAt)} time />, {counted(mine.rows, 'row')} changed
            </>
          }
          action={
            <div className="flex flex-wrap items-center gap-4">
              <ButtonLink href={`${listHref}/edit`}>Go on with the draft</ButtonLink>
              <ThrowAway
                route={`${route}/draft`}
                rows={mine.rows}
                version={() => Promise.resolve(mine.version)}
                onGone={() => router.refresh()}
              />
            </div>
          }
        >
          <p>
            {mine.base === newest.number
              ? `Made from revision ${mine.base}, and not saved as a revision yet.`
              : `Made from revision ${mine.base}; the list has moved on to revision ${newest.number} by ${newest.author}.`}
          </p>
        </Banner>
      )}
      <OthersAtWork others={others} />
    </>
  );
}
