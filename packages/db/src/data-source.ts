import 'reflect-metadata';
import { DataSource } from 'typeorm';
import { Account } from './entities/accounts/account';
import { Session } from './entities/accounts/session';
import { EmailToken } from './entities/accounts/email-token';
import { DeviceKey } from './entities/accounts/device-key';
import { Fishery } from './entities/fisheries/fishery';
import { FisheryRole } from './entities/fisheries/fishery-role';
import { Invitation } from './entities/fisheries/invitation';
import { Lake } from './entities/lakes/lake';
import { Peg } from './entities/lakes/peg';
import { Mark } from './entities/lakes/mark';
import { GaugeBoard } from './entities/lakes/gauge-board';
import { LevelReading } from './entities/lakes/level-reading';
import { WaterArea } from './entities/lakes/water-area';
import { LakePicture } from './entities/lakes/lake-picture';
import { Photo } from './entities/files/photo';
import { Booking } from './entities/bookings/booking';
import { BookingEvent } from './entities/bookings/booking-event';
import { CalendarFeed } from './entities/bookings/calendar-feed';
import { ClosureChoice } from './entities/bookings/closure-choice';
import { PegBlock } from './entities/bookings/peg-block';
import { PegTime } from './entities/bookings/peg-time';
import { WaitingEntry } from './entities/bookings/waiting-entry';
import { Closure } from './entities/closures/closure';
import { Notice } from './entities/notices/notice';
import { Dispute } from './entities/payments/dispute';
import { LedgerDeed } from './entities/payments/ledger-deed';
import { LedgerPosting } from './entities/payments/ledger-posting';
import { Payment } from './entities/payments/payment';
import { ProviderEvent } from './entities/payments/provider-event';
import { Receipt } from './entities/payments/receipt';
import { Refund } from './entities/payments/refund';
import { RuleAcknowledgement } from './entities/rules/rule-acknowledgement';
import { RuleSheet } from './entities/rules/rule-sheet';
import { LettingTermsRow } from './entities/bookings/letting-terms';
import { TicketType } from './entities/tickets/ticket-type';
import { SurveyVisit } from './entities/surveys/survey-visit';
import { BottomEvent } from './entities/surveys/bottom-event';
import { BottomTable } from './entities/surveys/bottom-table';
import { ConfirmedBottom } from './entities/surveys/confirmed-bottom';
import { LeadCalibration } from './entities/surveys/lead-calibration';
import { CastImport } from './entities/surveys/cast-import';
import { SurveyCast } from './entities/surveys/survey-cast';
import { SoundingFile } from './entities/surveys/sounding-file';
import { SoundingImport } from './entities/surveys/sounding-import';
import { ChartBuild } from './entities/charts/chart-build';
import { Spot } from './entities/charts/spot';
import { Chart } from './entities/charts/chart';
import { ChartLeftOut } from './entities/charts/chart-left-out';
import { Disagreement } from './entities/charts/disagreement';
import { AccountsAndFisheries1780000000000 } from './migrations/1780000000000-AccountsAndFisheries';
import { LakesAndPegs1780000001000 } from './migrations/1780000001000-LakesAndPegs';
import { SurveysAndCharts1780000002000 } from './migrations/1780000002000-SurveysAndCharts';
import { ReducedWith1780000003000 } from './migrations/1780000003000-ReducedWith';
import { KeptCasts1780000004000 } from './migrations/1780000004000-KeptCasts';
import { BottomLearns1780000006000 } from './migrations/1780000006000-BottomLearns';
import { Disagreements1780000008000 } from './migrations/1780000008000-Disagreements';
import { DeviceKeys1780000012000 } from './migrations/1780000012000-DeviceKeys';
import { PegCodes1780000009000 } from './migrations/1780000009000-PegCodes';
import { WaterAreas1780000007000 } from './migrations/1780000007000-WaterAreas';
import { SoundingLogs1780000005000 } from './migrations/1780000005000-SoundingLogs';
import { LakePictures1780000010000 } from './migrations/1780000010000-LakePictures';
import { ReportsTakenBack1780000014000 } from './migrations/1780000014000-ReportsTakenBack';
import { ChartLeftOut1780000013000 } from './migrations/1780000013000-ChartLeftOut';
import { TicketsAndPegTime1780000020000 } from './migrations/1780000020000-TicketsAndPegTime';
import { PaymentsAndLedger1780000021000 } from './migrations/1780000021000-PaymentsAndLedger';
import { FreedPegs1780000031000 } from './migrations/1780000031000-FreedPegs';
import { RulesNoticesAndWaiting1780000022000 } from './migrations/1780000022000-RulesNoticesAndWaiting';
import { OfficeMoney1780000032000 } from './migrations/1780000032000-OfficeMoney';

const ENTITIES = [
  Account,
  Session,
  EmailToken,
  DeviceKey,
  Fishery,
  FisheryRole,
  Invitation,
  Lake,
  Peg,
  Mark,
  GaugeBoard,
  LevelReading,
  WaterArea,
  LakePicture,
  Photo,
  TicketType,
  LettingTermsRow,
  RuleSheet,
  RuleAcknowledgement,
  Closure,
  Notice,
  Booking,
  BookingEvent,
  PegTime,
  PegBlock,
  ClosureChoice,
  WaitingEntry,
  CalendarFeed,
  Payment,
  ProviderEvent,
  Refund,
  Dispute,
  LedgerDeed,
  LedgerPosting,
  Receipt,
  SurveyVisit,
  CastImport,
  SurveyCast,
  BottomTable,
  ConfirmedBottom,
  BottomEvent,
  LeadCalibration,
  SoundingImport,
  SoundingFile,
  ChartBuild,
  Spot,
  Chart,
  ChartLeftOut,
  Disagreement,
];

/** Every migration in the order it runs. A new one is added at the end, never edited once merged. */
const MIGRATIONS = [
  AccountsAndFisheries1780000000000,
  LakesAndPegs1780000001000,
  SurveysAndCharts1780000002000,
  ReducedWith1780000003000,
  KeptCasts1780000004000,
  BottomLearns1780000006000,
  Disagreements1780000008000,
  DeviceKeys1780000012000,
  PegCodes1780000009000,
  WaterAreas1780000007000,
  SoundingLogs1780000005000,
  LakePictures1780000010000,
  ChartLeftOut1780000013000,
  TicketsAndPegTime1780000020000,
  PaymentsAndLedger1780000021000,
  RulesNoticesAndWaiting1780000022000,
  OfficeMoney1780000032000,
  ReportsTakenBack1780000014000,
  FreedPegs1780000031000,
];

/** A pool of connections to one database, opened by the caller with `initialize()`. */
export function makeDataSource(url: string, poolSize = 10): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities: ENTITIES,
    migrations: MIGRATIONS,
    migrationsTransactionMode: 'all',
    synchronize: false,
    logging: false,
    extra: { max: poolSize },
  });
}
