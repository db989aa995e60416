import { ChangeNotice, NoticeList, WriteNotice } from '@mereward/shared/notices/contract';
import { deed, read, type Route } from '../http/route';
import { noticeList } from './notice-list';
import { changeNotice, takeDown, writeNotice } from './write-notice';

const signIn = 'needed';

export const noticeRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/notices',
      summary: 'What a fishery tells its visitors now',
      signIn: 'open',
      answer: NoticeList,
    },
    (ctx, { id }) => noticeList(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/notices',
      summary: 'Put a notice up',
      signIn,
      body: WriteNotice,
      answer: NoticeList,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await writeNotice(ctx, id('fisheryId'), body);
      return noticeList(ctx, id('fisheryId'));
    },
  ),
  deed(
    { method: 'put', path: '/notices/:noticeId', summary: 'Change a notice', signIn, body: ChangeNotice },
    (ctx, { id, body }) => changeNotice(ctx, id('noticeId'), body),
  ),
  deed(
    { method: 'delete', path: '/notices/:noticeId', summary: 'Take a notice down', signIn },
    (ctx, { id }) => takeDown(ctx, id('noticeId')),
  ),
];
