import { StateWord } from '@/components/baselines/state-word';
import { currentLine } from '@/components/hand-off/curl-lines';
import { CurlLineItem } from '@/components/hand-off/curl-list';
import { LaterEvents } from '@/components/hand-off/later-events';
import { SignPlate } from '@/components/hand-off/sign-plate';
import { curlSubject, signExample } from '@/components/hand-off/subject';
import { HandOffFacts } from '@/components/hand-off/hand-off-facts';
import { ButtonLink } from '@/components/ui/button';
import { EmptyPlace } from '@/components/ui/empty-place';
import { Section } from '@/components/ui/section';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { loadHandOff } from '@/lib/server/hand-off/load-hand-off';
import { type ProgramAccess } from '@/lib/server/http/access';

/** The newest baseline of the default build for who takes it: digest, sign convention, a line to ask for it. */
export async function HandOffHere({ access: { program } }: { readonly access: ProgramAccess }) {
  const home = `/programs/${program.code}`;
  const { shown } = await loadHandOff(serverDb(), program.id, undefined);
  if (shown === null)
    return (
      <Section title="Hand-off">
        <EmptyPlace title="There is nothing to hand off yet">
          <p>As soon as a chief engineer has signed a baseline, it stands here and you hear of it by mail.</p>
        </EmptyPlace>
      </Section>
    );
  const { baseline, build, document } = shown;
  const { number, state } = baseline;
  return (
    <Section title={`Baseline ${number}, ${baseline.title}`} aside={<StateWord state={state} />}>
      <LaterEvents baseline={baseline} home={home} />
      <div className="grid gap-x-8 gap-y-4 lg:grid-cols-12">
        <div className="grid min-w-0 content-start gap-4 lg:col-span-5">
          <HandOffFacts
            build={build.title}
            document={document}
            digest={baseline.digest}
            supersededBy={baseline.superseded_by}
          />
          {state === 'current' ? (
            <div className="grid min-w-0 gap-1">
              <CurlLineItem {...currentLine(curlSubject(shown, env().APP_URL))} />
              <p className="text-ink-2">
                It reads your token from the variable TOKEN; tokens are made at hand-off.
              </p>
            </div>
          ) : null}
          <div>
            <ButtonLink kind="primary" href={`${home}/hand-off`}>
              Go to hand-off
            </ButtonLink>
          </div>
        </div>
        <div className="min-w-0 lg:col-span-7">
          <SignPlate example={signExample(document)} />
        </div>
      </div>
    </Section>
  );
}
