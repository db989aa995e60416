import { NoticeList, type ChangeNotice, type WriteNotice } from '@mereward/shared/notices/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

export const noticeKeys = {
  all: ['notices'] as const,
  ofFishery: (fisheryId: string) => ['notices', fisheryId] as const,
};

/** What a fishery tells its visitors now. */
export const useNotices = (fisheryId: string) =>
  useQuery({
    queryKey: noticeKeys.ofFishery(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/notices`, NoticeList, signal),
    enabled: fisheryId !== '',
  });

const changed = () => queryClient.invalidateQueries({ queryKey: noticeKeys.all });

export async function writeNotice(fisheryId: string, input: WriteNotice): Promise<NoticeList> {
  const list = await api.post(`/fisheries/${fisheryId}/notices`, input, NoticeList);
  void changed();
  return list;
}

export async function changeNotice(input: ChangeNotice): Promise<void> {
  await api.put(`/notices/${input.id}`, input, nothing);
  await changed();
}

export const useTakeDown = () =>
  useMutation({
    mutationFn: (noticeId: string) => api.del(`/notices/${noticeId}`, nothing),
    onSuccess: changed,
  });
