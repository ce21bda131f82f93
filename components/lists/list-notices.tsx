import { Banner } from '@/components/ui/banner';
import { ButtonLink } from '@/components/ui/button';

interface ListNoticesProps {
  readonly listHref: string;
  /** The revision on the page, and the newest; 0 before the first. */
  readonly shown: number;
  readonly newest: number;
  readonly import: { readonly id: string; readonly state: string; readonly file_name: string } | null;
  /** Files that wait for a mapping, newest first. */
  readonly uploads?: readonly { readonly id: string; readonly file_name: string; readonly author: string }[];
}

/** What a reader of a list must know first: that a newer revision is there, that a file is on its way, or was refused. */
export function ListNotices({ listHref, shown, newest, import: found, uploads = [] }: ListNoticesProps) {
  const open = found?.state === 'waiting' || found?.state === 'running';
  return (
    <>
      {shown === newest ? null : (
        <Banner
          severity="warning"
          word="Not the newest"
          action={<ButtonLink href={listHref}>{`Go to revision ${newest}`}</ButtonLink>}
        >
          <p>
            This is revision {shown} of {newest}.
          </p>
        </Banner>
      )}
      {uploads.map(({ id, file_name: file, author }) => (
        <Banner
          key={id}
          severity="note"
          word="To be mapped"
          action={<ButtonLink href={`${listHref}/uploads/${id}`}>Map its columns</ButtonLink>}
        >
          <p>
            {file}, uploaded by {author}, waits until someone says what its columns are.
          </p>
        </Banner>
      ))}
      {found !== null && (open || found.state === 'failed') ? (
        <Banner
          severity={open ? 'note' : 'warning'}
          action={
            <ButtonLink href={`${listHref}/imports/${found.id}`}>
              {open ? 'Follow the import' : 'See the problems'}
            </ButtonLink>
          }
        >
          <p>
            {open
              ? `${found.file_name} is being read and checked.`
              : `The newest file, ${found.file_name}, was refused. ${newest === 0 ? 'Nothing of it was kept.' : `Revision ${newest} stays in force.`}`}
          </p>
        </Banner>
      ) : null}
    </>
  );
}
