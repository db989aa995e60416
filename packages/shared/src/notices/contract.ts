import { z } from 'zod';
import { Version } from '../fisheries/contract';

const words = (max: number) => z.string().trim().max(max);

export const NoticeSeverity = z.enum(['info', 'caution', 'danger', 'closed']);
export type NoticeSeverity = z.infer<typeof NoticeSeverity>;

export const NoticeDetails = z.strictObject({
  title: words(120).min(1),
  text: words(500).min(1),
  audience: z.enum(['public', 'ticket', 'members', 'staff']),
});
export type NoticeDetails = z.infer<typeof NoticeDetails>;

/** POST /api/fisheries/:fisheryId/notices (head bailiff and up) */
export const WriteNotice = z.strictObject({
  id: z.uuid(),
  lakeIds: z.array(z.uuid()).max(100), // none: the whole fishery
  severity: NoticeSeverity,
  from: z.iso.datetime(),
  until: z.iso.datetime().nullable(),
  details: NoticeDetails,
});
export type WriteNotice = z.infer<typeof WriteNotice>;
/** PUT /api/notices/:noticeId (head bailiff and up); DELETE takes it down. */
export const ChangeNotice = WriteNotice.extend({ version: Version });
export type ChangeNotice = z.infer<typeof ChangeNotice>;

/** GET /api/fisheries/:fisheryId/notices (open; as much as the reader may see). Danger and closed can't be put away. */
export const NoticeView = z.object({
  id: z.uuid(),
  lakeIds: z.array(z.uuid()),
  severity: NoticeSeverity,
  from: z.iso.datetime(),
  until: z.iso.datetime().nullable(),
  details: NoticeDetails,
  writtenAt: z.iso.datetime(),
  version: z.int(),
  may: z.object({ change: z.boolean() }),
});
export type NoticeView = z.infer<typeof NoticeView>;
export const NoticeList = z.object({ notices: z.array(NoticeView), may: z.object({ write: z.boolean() }) });
export type NoticeList = z.infer<typeof NoticeList>;
