import {
  DraftAnswer,
  ReadersView,
  RulesToReadView,
  RulesView,
  SheetList,
  SheetView,
  type PublishDraft,
  type PutDraft,
} from '@mereward/shared/rules/sheet-contract';
import type { SheetNumber } from '@mereward/shared/rules/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { newId } from '@/lib/new-id';
import { queryClient } from '@/lib/queries';

export const ruleKeys = {
  all: ['rules'] as const,
  inForce: (fisheryId: string) => ['rules', fisheryId, 'in-force'] as const,
  versions: (fisheryId: string) => ['rules', fisheryId, 'versions'] as const,
  draft: (fisheryId: string) => ['rules', fisheryId, 'draft'] as const,
  readers: (fisheryId: string) => ['rules', fisheryId, 'readers'] as const,
  sheet: (sheetId: string) => ['rules', 'sheet', sheetId] as const,
  ofBooking: (bookingId: string) => ['rules', 'booking', bookingId] as const,
};

/** The rules in force at a fishery, kept on the device: they are wanted where there is no signal. */
export const useRules = (fisheryId: string) =>
  useQuery({
    queryKey: ruleKeys.inForce(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/rules`, RulesView, signal),
    enabled: fisheryId !== '',
  });

/** What is to be read for a booking, or was. */
export const useRulesToRead = (bookingId: string) =>
  useQuery({
    queryKey: ruleKeys.ofBooking(bookingId),
    queryFn: ({ signal }) => api.get(`/bookings/${bookingId}/rules`, RulesToReadView, signal),
    enabled: bookingId !== '',
  });

export const useSheets = (fisheryId: string) =>
  useQuery({
    queryKey: ruleKeys.versions(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/rules/versions`, SheetList, signal),
  });

export const useSheet = (sheetId: string) =>
  useQuery({
    queryKey: ruleKeys.sheet(sheetId),
    queryFn: ({ signal }) => api.get(`/rule-sheets/${sheetId}`, SheetView, signal),
  });

export const useRuleDraft = (fisheryId: string) =>
  useQuery({
    queryKey: ruleKeys.draft(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/rules/draft`, DraftAnswer, signal),
  });

/** Who has read what. Names of visitors are not kept on the device. */
export const useReaders = (fisheryId: string) =>
  useQuery({
    queryKey: ruleKeys.readers(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/rules/readers`, ReadersView, signal),
    meta: { keep: false },
  });

const changed = () => queryClient.invalidateQueries({ queryKey: ruleKeys.all });
/** A ticket's own view says whether rules are still to be read. */
const read = () => Promise.all([changed(), queryClient.invalidateQueries({ queryKey: ['bookings'] })]);

export async function putRuleDraft(fisheryId: string, input: PutDraft): Promise<DraftAnswer> {
  const answer = await api.put(`/fisheries/${fisheryId}/rules/draft`, input, DraftAnswer);
  queryClient.setQueryData(ruleKeys.draft(fisheryId), answer);
  return answer;
}

export const useDropDraft = (fisheryId: string) =>
  useMutation({
    mutationFn: () => api.del(`/fisheries/${fisheryId}/rules/draft`, nothing),
    onSuccess: changed,
  });

export const usePublishRules = (fisheryId: string) =>
  useMutation({
    mutationFn: (input: PublishDraft) => api.post(`/fisheries/${fisheryId}/rules/publish`, input, RulesView),
    onSuccess: changed,
  });

/** Keeps that the reader has read a version, by this device's clock. */
export const useAcknowledgeRules = (fisheryId: string) =>
  useMutation({
    mutationFn: (version: SheetNumber) =>
      api.post(
        `/fisheries/${fisheryId}/rules/acknowledge`,
        { id: newId(), version, at: new Date().toISOString(), language: 'en-GB' },
        RulesView,
      ),
    onSuccess: read,
  });

type Witnessed = { version: SheetNumber; method: 'paper' | 'verbal' };

/** Keeps that a bailiff read the rules to a ticket's holder, or saw them sign. */
export const useWitnessReading = (bookingId: string) =>
  useMutation({
    mutationFn: (witnessed: Witnessed) =>
      api.post(
        `/bookings/${bookingId}/rules/witnessed`,
        { id: newId(), ...witnessed, at: new Date().toISOString(), language: 'en-GB' },
        RulesToReadView,
      ),
    onSuccess: read,
  });
