import { Notice } from '@mereward/db/entities/notices/notice';
import type { NoticeList } from '@mereward/shared/notices/contract';
import { holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { isMember, isStaff } from '../lakes/policy';
import { NOTICE_WRITERS } from './policy';
import { noticeView } from './write-notice';

const TICKET_TO_COME = `
  SELECT 1 FROM booking WHERE account_id = $1 AND fishery_id = $2 AND upper(during) > $3
     AND status IN ('hold', 'pending_payment', 'confirmed', 'checked_in', 'choosing') LIMIT 1`;

const GRAVEST = ['danger', 'closed', 'caution', 'info'];

/** What a fishery tells this reader now, the gravest first; those who write notices see what is to come as well. */
export async function noticeList({ tx, actor, now }: Ctx, fisheryId: string): Promise<NoticeList> {
  await fisheryFound(tx, fisheryId);
  const writes = holdsAny(actor, fisheryId, NOTICE_WRITERS);
  const audiences = ['public'];
  if (isStaff(actor, fisheryId)) audiences.push('staff', 'members', 'ticket');
  else if (actor.kind === 'account') {
    if (isMember(actor, fisheryId)) audiences.push('members');
    const tickets: unknown[] = await tx.query(TICKET_TO_COME, [actor.id, fisheryId, now]);
    if (tickets.length > 0) audiences.push('ticket');
  }
  const rows = await tx
    .createQueryBuilder(Notice, 'n')
    .where('n.fishery_id = :fisheryId AND n.taken_down_at IS NULL', { fisheryId })
    .andWhere(writes ? '(upper_inf(n.during) OR upper(n.during) > :now)' : 'n.during @> :now::timestamptz', {
      now,
    })
    .andWhere(`n.details->>'audience' IN (:...audiences)`, { audiences })
    .orderBy('n.written_at', 'DESC')
    .limit(200)
    .getMany();
  const grave = ({ severity }: Notice): number => GRAVEST.indexOf(severity);
  return {
    notices: rows.sort((a, b) => grave(a) - grave(b)).map((row) => noticeView(row, actor)),
    may: { write: writes },
  };
}
