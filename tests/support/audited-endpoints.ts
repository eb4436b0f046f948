/** What the audit trail holds of the endpoints that are declared: everything but what stands here, each with its reason. */
import type { EndpointName } from '../../src/contract/endpoints.ts';

const COMPUTES = 'It computes an answer and stores nothing.';
const WAITS = 'Rows wait aside; nothing of them is a site before the import is finished.';

/** Acts that leave nothing in the trail. */
export const writesNoEvent: Partial<Record<EndpointName, string>> = {
  previewDerivedYear: COMPUTES,
  judgeSurface: COMPUTES,
  judgeRange: COMPUTES,
  findWhatWouldPass: COMPUTES,
  rankPlaces: COMPUTES,
  rescore: COMPUTES,
  previewBrief: COMPUTES,
  openInvitation: 'It reads what a link leads to.',
  readNotices: 'It marks what a person was told as read, for that person alone.',
  startTwoFactor: 'A secret counts for nothing until a code of it is confirmed, which is written down.',
  startSiteImport: WAITS,
  addSiteImportRows: WAITS,
  checkSiteImport: WAITS,
};

/**
 * Acts that nobody of the matrix does, as they want a key out of a mail, a code, or something that has stopped, or find nothing to
 * change there; tests/server/audit/every-act.test.ts does them.
 */
export const doneElsewhere: readonly EndpointName[] = [
  ...(['setUp', 'changePassword', 'askEmailChange', 'confirmEmail', 'askReset', 'resetPassword'] as const),
  ...(['confirmTwoFactor', 'renewRecoveryCodes', 'endTwoFactor', 'endSession'] as const),
  ...(['acceptAsNewPerson', 'acceptOwnInvitation'] as const),
  ...(['mergeStations', 'retryWeatherFile', 'retryWeatherArchive', 'answerWeatherFile', 'actOnWeatherFiles'] as const),
  ...([
    'changeWeatherBatch',
    'moveSite',
    'removeSites',
    'saveBriefVersion',
    'askDeletion',
    'stopDeletion',
    'getExport',
  ] as const),
];
