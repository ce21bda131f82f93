import { type Metadata } from 'next';
import { baselinesOfProgram } from '@/db/queries/baselines';
import { massHistory } from '@/db/queries/baseline-history';
import { limitsInForce } from '@/db/queries/settings';
import { massLimitsOf } from '@/components/limits/mass-limits';
import { LIMIT_KIND_WORDS } from '@/components/settings/words';
import { tightest } from '@/lib/loading/limits';
import { AccountChoice } from '@/components/baselines/account-choice';
import { AccountTable } from '@/components/baselines/account-table';
import { cgLimits } from '@/components/baselines/cg-limits';
import { chosen } from '@/components/baselines/choose';
import { ConditionChoice } from '@/components/baselines/condition-choice';
import { HistoryChart } from '@/components/baselines/history-chart';
import { HistoryTable } from '@/components/baselines/history-table';
import { accountPath, rowsPath } from '@/components/baselines/paths';
import { shownQuantity } from '@/components/baselines/quantity';
import { groupName, StepChart } from '@/components/baselines/step-chart';
import { Banner } from '@/components/ui/banner';
import { Caution } from '@/components/ui/caution';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { ACCOUNT_QUANTITIES } from '@/lib/baselines/mass-account';
import { loadAccount, namesSides } from '@/lib/server/baselines/load-account';
import { serverDb } from '@/lib/server/database';
import { orShow, requireProgram } from '@/lib/server/http/page';
import { askedSystem } from '@/lib/units/choice';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { ProgramFrame } from '../../frame';

export const metadata: Metadata = { title: 'Mass account' };

/** Where a change between two baselines comes from, group by group; and the mass of all baselines against its limit. */
export default async function AccountPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines/account'>) {
  const access = await requireProgram((await params).program, 'baselines.read');
  const { program, can } = access;
  const home = `/programs/${program.code}/baselines`;
  const asked = await searchParams;
  const [baselines, limits] = await Promise.all([
    baselinesOfProgram(serverDb(), program.id),
    limitsInForce(serverDb(), program.id),
  ]);
  const sides = namesSides(baselines, asked);
  const head = (
    <PageHead
      title="Mass account"
      above={<TextLink href={home}>Baselines</TextLink>}
      lead="Where the change between two baselines comes from, group by group, and how the mass stands to its limit."
    />
  );
  if (sides === null)
    return (
      <ProgramFrame access={access} current="baselines">
        {head}
        <EmptyPlace title="No baseline is signed yet">
          <p>The account begins with the first signed baseline and shows steps from the second one on.</p>
        </EmptyPlace>
      </ProgramFrame>
    );
  const quantity = ACCOUNT_QUANTITIES.find((one) => one === asked['quantity']) ?? 'mass';
  const within = typeof asked['within'] === 'string' && asked['within'] !== '' ? asked['within'] : null;
  const { conditions, condition, outcome, converted } = await orShow(() =>
    loadAccount(serverDb(), program.id, { ...sides, condition: asked['condition'], quantity, within }),
  );
  const system = askedSystem(asked['units']);
  const units = OUTPUT_UNITS[system];
  const shown = shownQuantity(quantity, units);
  const history = condition === null ? [] : await massHistory(serverDb(), program.id, condition.code);
  const mass = shownQuantity('mass', units);
  const massLimits = massLimitsOf(limits, condition?.code ?? null);
  const keep = { from: sides.from, to: sides.to, quantity, within };
  const steps =
    'account' in outcome
      ? outcome.account.steps.map((step) => ({
          key: step.group,
          name: groupName(step.group),
          href:
            can('lists.read') && step.group !== ''
              ? rowsPath(home, sides.from, { to: sides.to }, { group: step.group })
              : null,
          deeper:
            step.deeper && step.group !== within
              ? accountPath(home, sides.from, sides.to, {
                  quantity,
                  within: step.group,
                  ...(condition === null ? {} : { condition: condition.code }),
                })
              : null,
          from: shown.shown(step.from),
          to: shown.shown(step.to),
        }))
      : [];
  return (
    <ProgramFrame access={access} current="baselines">
      {head}
      <AccountChoice
        path={`${home}/account`}
        baselines={baselines}
        sides={sides}
        quantity={quantity}
        condition={condition?.code ?? null}
        units={system}
      />
      <ConditionChoice
        path={`${home}/account`}
        keep={keep}
        conditions={chosen(conditions, null) === null ? [] : conditions}
        current={condition?.code ?? null}
        system={system}
      />
      <Section
        title={`${shown.name} from baseline ${sides.from} to baseline ${sides.to}${within === null ? '' : `, within ${within}`}`}
        aside={
          within === null ? null : (
            <TextLink href={accountPath(home, sides.from, sides.to, { quantity })}>All groups</TextLink>
          )
        }
        lead={
          <p>
            The account of each group before is replaced by its account after, in the order of the groups; the
            steps add up to the whole change.
            {quantity === 'mass'
              ? ' Masses simply add, so that their order does not matter.'
              : ' The size of a step of CG or inertia depends on that order, their sum does not.'}
            {quantity.startsWith('i')
              ? ' Inertia is about the CG in body axes, products are positive integrals.'
              : null}
            {quantity.startsWith('cg') ? ' The CG is in airframe axes, from the datum.' : null}
            {converted === null ? null : ` ${converted}`}
          </p>
        }
      >
        {'refused' in outcome ? (
          <Banner severity="note" title="There is no account of this by group">
            <p>{outcome.refused}</p>
          </Banner>
        ) : steps.length === 0 ? (
          <p className="text-ink-2">Nothing changed.</p>
        ) : (
          <>
            <StepChart
              label={`${shown.name} of baseline ${sides.from}, a step for each group that changed, to baseline ${sides.to}. The table below has the figures.`}
              unit={shown.unit}
              before={{
                name: within === null ? `Baseline ${sides.from}` : 'Before these steps',
                value: shown.shown(outcome.account.before),
              }}
              after={{
                name: within === null ? `Baseline ${sides.to}` : 'After these steps',
                value: shown.shown(outcome.account.after),
              }}
              steps={steps}
            />
            <AccountTable
              quantity={shown}
              before={shown.shown(outcome.account.before)}
              after={shown.shown(outcome.account.after)}
              steps={steps}
              unchanged={outcome.account.unchanged}
            />
          </>
        )}
      </Section>
      <Section
        title="Mass over all baselines"
        aside={condition?.title ?? null}
        lead="Lines are basic masses, dashed ones predicted masses with growth. Limits are those in force today for this condition; one that lies far from the masses stands at the edge."
      >
        <HistoryChart
          label="Basic and predicted mass of every signed baseline against the limits of mass. The table below has the figures."
          unit={mass.unit}
          points={history.flatMap((one) =>
            one.mass === null || one.predicted === null
              ? []
              : [
                  {
                    number: one.number,
                    build: one.buildTitle,
                    mass: mass.shown(one.mass),
                    predicted: mass.shown(one.predicted),
                  },
                ],
          )}
          limits={massLimits.map((limit) => ({
            value: mass.shown(limit.value),
            words: `${LIMIT_KIND_WORDS[limit.kind].toLowerCase()}, ${limit.sense === 'at-most' ? 'at most' : 'at least'}`,
          }))}
        />
        <HistoryTable
          home={home}
          lines={history}
          unit={units.mass}
          massLimit={tightest(limits, 'mass', condition?.code ?? null).most?.value ?? null}
          cgLimits={cgLimits(limits, condition?.code ?? null)}
        />
      </Section>
      <Caution />
    </ProgramFrame>
  );
}
