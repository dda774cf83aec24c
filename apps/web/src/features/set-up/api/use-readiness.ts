import type { PersonView } from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { apiList } from '../../../shared/api/client';
import { useSession } from '../../../shared/session/session';
import { plantDay } from '../../../shared/time/plant-time';
import { useNow } from '../../../shared/time/use-now';
import { readinessOf, type Readiness } from '../readiness';
import {
  useChannelSetUps,
  useCharacteristics,
  useGauges,
  useLines,
  usePlantSetUp,
  useProducts,
  useShifts,
  useSpecifications,
} from './set-up';

export interface ReadinessState {
  /** Null until all of it is known. */
  items: Readiness[] | null;
  /** No workbook was read yet. */
  isNew: boolean;
  error: unknown;
  readAgain: () => void;
}

/** What is there and what is missing, from the lists that the sections show. */
export function useReadiness(plantId: number): ReadinessState {
  const { can } = useSession();
  const now = useNow();
  const plant = usePlantSetUp(plantId);
  const shifts = useShifts(plantId);
  const lines = useLines(plantId);
  const products = useProducts(plantId);
  const characteristics = useCharacteristics(plantId);
  const specifications = useSpecifications(plantId);
  const gauges = useGauges(plantId);
  const channels = useChannelSetUps(plantId);
  const mayKnowPeople = can('set_up_plant');
  const people = useQuery({
    queryKey: ['plants', plantId, 'people'],
    queryFn: ({ signal }) => apiList<PersonView>(`/plants/${plantId}/people`, signal),
    enabled: mayKnowPeople,
  });
  const queries = [plant, shifts, lines, products, characteristics, specifications, gauges, channels, people];
  const failed = queries.find((query) => query.isError && query.data === undefined);
  const isKnown =
    plant.data && shifts.data && lines.data && products.data && characteristics.data && specifications.data;
  const items =
    isKnown && gauges.data && channels.data && (people.data || !mayKnowPeople)
      ? readinessOf({
          plant: plant.data,
          calendars: shifts.data.calendars,
          lines: lines.data,
          products: products.data,
          characteristics: characteristics.data,
          specifications: specifications.data,
          gauges: gauges.data,
          channels: channels.data,
          people: people.data?.filter(({ state }) => state === 'active') ?? null,
          now,
          today: plantDay(now, plant.data.timeZone),
        })
      : null;
  const readAgain = () => queries.forEach((query) => query.isError && void query.refetch());
  const isNew = plant.data?.mayChangeTimeZone ?? true;
  return { items, isNew, error: failed?.error ?? null, readAgain };
}
