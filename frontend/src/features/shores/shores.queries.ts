import { keepPreviousData, queryOptions, skipToken } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';
import type { ShoreSettings } from '#shared/contracts/shores.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

/** The settings of a shore that decide which days and hours it can be worked. */
export type ShoreWater = Omit<
  ShoreSettings,
  'name' | 'meetingPlace' | 'hazards' | 'waysOff' | 'phoneSignal' | 'emergencyWords' | 'ratioPreset'
>;

export interface Position {
  readonly latitude: number;
  readonly longitude: number;
}

/** The replies that this feature keeps, under one root. */
export const shoresQueries = {
  root: ['shores'] as const,
  list: () =>
    queryOptions({
      queryKey: [...shoresQueries.root, 'list'],
      queryFn: ({ signal }) => call('seeShores', {}, signal),
    }),
  shore: (shoreId: string) =>
    queryOptions({
      queryKey: [...shoresQueries.root, 'shore', shoreId],
      queryFn: ({ signal }) => call('seeShore', { params: { shoreId } }, signal),
    }),
  /** Nothing is asked without a position; the stations of the one before stay meanwhile. */
  stations: (at: Position | null) =>
    queryOptions({
      queryKey: [...shoresQueries.root, 'stations', at],
      queryFn:
        at === null
          ? skipToken
          : ({ signal }) => call('findStations', { query: { ...at } }, signal),
      placeholderData: keepPreviousData,
    }),
  /** Nothing is asked without settings; the water of those before stays meanwhile. */
  preview: (settings: ShoreWater | null, on: CalendarDay | null) =>
    queryOptions({
      queryKey: [...shoresQueries.root, 'preview', settings, on],
      queryFn:
        settings === null
          ? skipToken
          : ({ signal }) => call('previewShore', { body: { settings, on } }, signal),
      placeholderData: keepPreviousData,
    }),
};
