/** What every page, paper, mail and answer made from results says about them. */
export const CAUTION =
  'Results are only as good as the lists behind them. Nothing here is an approved weight-and-balance report or flight manual: ' +
  'loading for flight follows the approved manual, local regulations and licensed or certificated people. ' +
  'Approval inside Polhode is a project decision, not an airworthiness approval.';
