import type { ComponentType } from 'react';
import { ChannelSection } from './components/channel-section';
import { CharacteristicSection } from './components/characteristic-section';
import { GaugeSection } from './components/gauge-section';
import { LineSection } from './components/line-section';
import { PlantSection } from './components/plant-section';
import { ProductSection } from './components/product-section';
import { SpecificationSection } from './components/specification-section';
import { WorkbookSection } from './workbook/workbook-section';

export interface Section {
  /** As in the address. */
  key: string;
  name: string;
  Component: ComponentType<{ plantId: number }>;
}

export const SECTIONS: readonly Section[] = [
  { key: 'plant', name: 'Plant', Component: PlantSection },
  { key: 'lines', name: 'Lines and shifts', Component: LineSection },
  { key: 'products', name: 'Products', Component: ProductSection },
  { key: 'characteristics', name: 'Characteristics', Component: CharacteristicSection },
  { key: 'specifications', name: 'Specifications', Component: SpecificationSection },
  { key: 'gauges', name: 'Gauges', Component: GaugeSection },
  { key: 'channels', name: 'Channels', Component: ChannelSection },
  { key: 'workbook', name: 'Workbook', Component: WorkbookSection },
];
