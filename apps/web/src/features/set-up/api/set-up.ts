import type {
  ChannelSetUpView,
  CharacteristicSetUpView,
  GaugeSetUpView,
  LineSetUpView,
  PlantSetUpView,
  ProductSetUpView,
  ShiftCalendarsView,
  SpecificationSetUpView,
} from '@app/contracts';
import { useQuery } from '@tanstack/react-query';
import { apiGet, apiList } from '../../../shared/api/client';

export const setUpKey = (plantId: number, thing?: string) =>
  thing === undefined ? (['plants', plantId, 'set-up'] as const) : (['plants', plantId, 'set-up', thing] as const);

export function usePlantSetUp(plantId: number) {
  return useQuery({
    queryKey: setUpKey(plantId, 'plant'),
    queryFn: ({ signal }) => apiGet<PlantSetUpView>(`/plants/${plantId}/set-up`, signal),
  });
}

export function useShifts(plantId: number) {
  return useQuery({
    queryKey: setUpKey(plantId, 'shifts'),
    queryFn: ({ signal }) => apiGet<ShiftCalendarsView>(`/plants/${plantId}/set-up/shifts`, signal),
  });
}

function useThings<T>(plantId: number, thing: string) {
  return useQuery({
    queryKey: setUpKey(plantId, thing),
    queryFn: ({ signal }) => apiList<T>(`/plants/${plantId}/set-up/${thing}`, signal),
  });
}

export const useLines = (plantId: number) => useThings<LineSetUpView>(plantId, 'lines');
export const useProducts = (plantId: number) => useThings<ProductSetUpView>(plantId, 'products');
export const useCharacteristics = (plantId: number) => useThings<CharacteristicSetUpView>(plantId, 'characteristics');
export const useSpecifications = (plantId: number) => useThings<SpecificationSetUpView>(plantId, 'specifications');
export const useGauges = (plantId: number) => useThings<GaugeSetUpView>(plantId, 'gauges');
export const useChannelSetUps = (plantId: number) => useThings<ChannelSetUpView>(plantId, 'channels');
