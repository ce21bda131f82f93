import { type Metadata } from 'next';
import { listTokens } from '@/db/queries/tokens';
import { StateWord } from '@/components/baselines/state-word';
import { BuildTable } from '@/components/hand-off/build-table';
import { ConventionFacts } from '@/components/hand-off/convention-facts';
import { curlLines } from '@/components/hand-off/curl-lines';
import { CurlList } from '@/components/hand-off/curl-list';
import { downloadPath, Downloads } from '@/components/hand-off/downloads';
import { HandOffFacts } from '@/components/hand-off/hand-off-facts';
import { LaterEvents } from '@/components/hand-off/later-events';
import { SignPlate } from '@/components/hand-off/sign-plate';
import { curlSubject, signExample } from '@/components/hand-off/subject';
import { TokenList } from '@/components/hand-off/token-list';
import { TokenMaker } from '@/components/hand-off/token-maker';
import { AxesSketch } from '@/components/settings/axes-sketch';
import { ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { loadHandOff } from '@/lib/server/hand-off/load-hand-off';
import { orShow, requireProgram } from '@/lib/server/http/page';
import { makeTokenAction } from '../../../account/actions';
import { ProgramFrame } from '../frame';

export const metadata: Metadata = { title: 'Hand-off' };

/** What a simulation takes: a signed baseline as data, with its signs, axes and units. */
export default async function HandOffPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/hand-off'>) {
  const access = await requireProgram((await params).program, 'baselines.read');
  const { program, user, can } = access;
  const asked = (await searchParams)['baseline'];
  const [{ byBuild, shown }, ownTokens] = await Promise.all([
    orShow(() => loadHandOff(serverDb(), program.id, asked)),
    listTokens(serverDb(), user.id),
  ]);
  const now = new Date();
  const tokens = ownTokens.filter(
    ({ scopes, programs, revokedAt, expiresAt }) =>
      revokedAt === null &&
      expiresAt > now &&
      scopes.includes('baselines:read') &&
      (programs === null || programs.includes(program.code)),
  );
  const home = `/programs/${program.code}`;
  const lead = 'Signed baselines as data for simulators, with their signs, axes and units.';
  if (shown === null)
    return (
      <ProgramFrame access={access} current="hand-off">
        <PageHead title="Hand-off" lead={lead} />
        <EmptyPlace
          title="There is nothing to hand off yet"
          action={
            can('lists.read') ? <ButtonLink href={`${home}/baselines`}>Go to baselines</ButtonLink> : null
          }
        >
          <p>As soon as a chief engineer has signed a baseline, simulators can take it from here.</p>
        </EmptyPlace>
      </ProgramFrame>
    );
  const { baseline, build, document } = shown;
  const { number, state } = baseline;
  return (
    <ProgramFrame access={access} current="hand-off">
      <PageHead
        title={`Hand-off of baseline ${number}, ${baseline.title}`}
        lead={lead}
        actions={
          <>
            <StateWord state={state} />
            <ButtonLink
              kind={state === 'current' ? 'primary' : 'secondary'}
              href={downloadPath(program.code, number, 'document')}
              download
            >
              {`Download baseline ${number}`}
            </ButtonLink>
          </>
        }
      />
      <LaterEvents baseline={baseline} home={home} />
      <div className="grid gap-x-8 gap-y-8 lg:grid-cols-12">
        <div className="grid min-w-0 content-start gap-8 lg:col-span-8">
          <Section title="Signs and axes">
            <SignPlate example={signExample(document)} />
            <div className="grid items-start gap-x-8 gap-y-4 md:grid-cols-[2fr_1fr]">
              <ConventionFacts conventions={document.conventions} />
              <AxesSketch axes={['forward', 'right', 'down']} of="Body axes" />
            </div>
          </Section>
          <Section
            title="Ask the API"
            lead="Each line can be pasted into a shell as it stands. Files are written where it is run; a refusal is an error and never a file."
            aside={
              <TextLink external href="/api/v1/openapi.json">
                OpenAPI document
              </TextLink>
            }
          >
            <CurlList lines={curlLines(curlSubject(shown, env().APP_URL))} />
          </Section>
        </div>
        <div className="grid min-w-0 content-start gap-8 lg:col-span-4">
          <Section title="What it is">
            <HandOffFacts
              build={build.title}
              document={document}
              digest={baseline.digest}
              supersededBy={baseline.superseded_by}
            />
            <p>
              <TextLink
                href={`${home}/baselines/${number}`}
              >{`Baseline ${number} with its results`}</TextLink>
            </p>
          </Section>
          <Section title="Files">
            <Downloads program={program.code} number={number} state={state} />
          </Section>
          <Section title="Tokens" aside={<TextLink href="/account">All your tokens</TextLink>}>
            {tokens.length === 0 ? (
              <p className="measure text-ink-2">You have no token that reads this program.</p>
            ) : (
              <TokenList tokens={tokens} />
            )}
            <TokenMaker action={makeTokenAction} program={{ code: program.code, title: program.title }} />
          </Section>
          <Caution />
        </div>
      </div>
      <Section title="Signed baselines" aside="Newest first">
        <div className="grid gap-6">
          {byBuild.map((each) => (
            <BuildTable
              key={each.build.id}
              program={program.code}
              build={each.build.title}
              home={`${home}/hand-off`}
              shown={number}
              lines={each.baselines.map((one) => ({
                number: one.number,
                title: one.title,
                state: one.state,
                signedAt: one.signed_at,
                signer: one.signer,
                digest: one.digest,
              }))}
            />
          ))}
        </div>
      </Section>
    </ProgramFrame>
  );
}
