/** Every endpoint of the product: what mount, the permission matrix and the API description go through. */
import * as links from './account-links.ts';
import * as accounts from './accounts.ts';
import * as api from './api.ts';
import * as audit from './audit.ts';
import * as briefs from './briefs.ts';
import * as climate from './climate.ts';
import * as depression from './depression-map.ts';
import * as designPoints from './design-points.ts';
import type { Endpoint } from './endpoint.ts';
import * as hourList from './hour-list.ts';
import * as invitations from './invitations.ts';
import * as mails from './mails.ts';
import * as members from './members.ts';
import * as method from './method.ts';
import * as notices from './notices.ts';
import * as own from './own-account.ts';
import * as place from './place.ts';
import * as doubts from './place-doubts.ts';
import * as places from './places.ts';
import * as map from './programme-map.ts';
import * as programmes from './programmes.ts';
import * as ranking from './ranking.ts';
import * as rescoring from './rescore.ts';
import * as hours from './run-hours.ts';
import * as runs from './runs.ts';
import * as siteImports from './site-imports.ts';
import * as siteRecord from './site-record.ts';
import * as sites from './sites.ts';
import * as stations from './stations.ts';
import * as surface from './surface.ts';
import * as data from './team-data.ts';
import * as events from './team-events.ts';
import * as tokens from './tokens.ts';
import * as weather from './weather.ts';
import * as acts from './weather-acts.ts';
import * as batches from './weather-batches.ts';
import * as library from './weather-library.ts';
import * as reading from './weather-reading.ts';

export const endpoints = {
  getSession: accounts.getSession,
  signIn: accounts.signIn,
  signOut: accounts.signOut,
  setUp: accounts.setUp,
  getAccount: own.getAccount,
  renamePerson: own.renamePerson,
  changePassword: own.changePassword,
  askEmailChange: own.askEmailChange,
  listSessions: own.listSessions,
  endSession: own.endSession,
  endOtherSessions: own.endOtherSessions,
  startTwoFactor: own.startTwoFactor,
  confirmTwoFactor: own.confirmTwoFactor,
  endTwoFactor: own.endTwoFactor,
  renewRecoveryCodes: own.renewRecoveryCodes,
  setNoticesOff: own.setNoticesOff,
  listNotices: notices.listNotices,
  readNotices: notices.readNotices,
  askReset: links.askReset,
  resetPassword: links.resetPassword,
  confirmEmail: links.confirmEmail,
  listInvitations: invitations.listInvitations,
  invite: invitations.invite,
  resendInvitation: invitations.resendInvitation,
  revokeInvitation: invitations.revokeInvitation,
  openInvitation: invitations.openInvitation,
  acceptAsNewPerson: invitations.acceptAsNewPerson,
  listOwnInvitations: invitations.listOwnInvitations,
  acceptOwnInvitation: invitations.acceptOwnInvitation,
  listMembers: members.listMembers,
  changeMember: members.changeMember,
  endMemberSessions: members.endMemberSessions,
  removeMember: members.removeMember,
  leaveTeam: members.leaveTeam,
  makeTeam: members.makeTeam,
  renameTeam: members.renameTeam,
  listProgrammes: programmes.listProgrammes,
  makeProgramme: programmes.makeProgramme,
  renameProgramme: programmes.renameProgramme,
  setProgrammeMembers: programmes.setProgrammeMembers,
  listMails: mails.listMails,
  listExports: data.listExports,
  askExport: data.askExport,
  getExport: data.getExport,
  getDeletion: data.getDeletion,
  askDeletion: data.askDeletion,
  stopDeletion: data.stopDeletion,
  listWeatherFiles: library.listWeatherFiles,
  uploadWeatherFile: weather.uploadWeatherFile,
  getWeatherFile: weather.getWeatherFile,
  getOriginal: weather.getOriginal,
  acceptWeatherFile: acts.acceptWeatherFile,
  withdrawWeatherFile: acts.withdrawWeatherFile,
  actOnWeatherFiles: acts.actOnWeatherFiles,
  retryWeatherFile: acts.retryWeatherFile,
  answerWeatherFile: reading.answerWeatherFile,
  getWeatherFileLines: reading.getWeatherFileLines,
  getWeatherYearColumns: reading.getWeatherYearColumns,
  setLicence: reading.setLicence,
  listStations: stations.listStations,
  getStation: stations.getStation,
  moveStation: stations.moveStation,
  mergeStations: stations.mergeStations,
  setRuleOff: stations.setRuleOff,
  setRuleOn: stations.setRuleOn,
  listWeatherBatches: batches.listWeatherBatches,
  getWeatherBatch: batches.getWeatherBatch,
  startWeatherBatch: batches.startWeatherBatch,
  changeWeatherBatch: batches.changeWeatherBatch,
  uploadWeatherFiles: batches.uploadWeatherFiles,
  uploadWeatherArchive: batches.uploadWeatherArchive,
  retryWeatherArchive: batches.retryWeatherArchive,
  previewDerivedYear: climate.previewDerivedYear,
  deriveWeatherYear: climate.deriveWeatherYear,
  watchTeam: events.watchTeam,
  findPlaces: places.findPlaces,
  getMap: map.getMap,
  getSurface: surface.getSurface,
  judgeSurface: surface.judgeSurface,
  getEstimate: surface.getEstimate,
  getDepressionMap: depression.getDepressionMap,
  judgeRange: doubts.judgeRange,
  findWhatWouldPass: doubts.findWhatWouldPass,
  getSitePlace: place.getSitePlace,
  getStationPlace: place.getStationPlace,
  getRunHours: hours.getRunHours,
  rankPlaces: ranking.rankPlaces,
  getRun: runs.getRun,
  listRunHours: hourList.listRunHours,
  getDesignPoints: designPoints.getDesignPoints,
  exportRunHours: hours.exportRunHours,
  rescore: rescoring.rescore,
  listPresets: briefs.listPresets,
  listBriefs: briefs.listBriefs,
  makeBrief: briefs.makeBrief,
  listBriefVersions: briefs.listBriefVersions,
  getBriefVersion: briefs.getBriefVersion,
  compareBriefVersions: briefs.compareBriefVersions,
  saveBriefVersion: briefs.saveBriefVersion,
  previewBrief: briefs.previewBrief,
  listSites: sites.listSites,
  getSite: siteRecord.getSite,
  makeSite: sites.makeSite,
  changeSite: sites.changeSite,
  moveSite: sites.moveSite,
  removeSites: sites.removeSites,
  setSiteDuty: siteRecord.setSiteDuty,
  getGround: siteRecord.getGround,
  startSiteImport: siteImports.startSiteImport,
  addSiteImportRows: siteImports.addSiteImportRows,
  checkSiteImport: siteImports.checkSiteImport,
  finishSiteImport: siteImports.finishSiteImport,
  listSiteImports: siteImports.listSiteImports,
  undoSiteImport: siteImports.undoSiteImport,
  exportSites: siteImports.exportSites,
  listTokens: tokens.listTokens,
  makeToken: tokens.makeToken,
  revokeToken: tokens.revokeToken,
  listAuditEvents: audit.listAuditEvents,
  exportAuditCsv: audit.exportAuditCsv,
  exportAuditJson: audit.exportAuditJson,
  getMethodChecks: method.getMethodChecks,
  getApiDescription: api.getApiDescription,
} satisfies Record<string, Endpoint>;

export type EndpointName = keyof typeof endpoints;
