import type { ZoneOrKitchen } from '@/lib/engine/types';

const ZONE_WORDS: Readonly<Record<ZoneOrKitchen, string>> = {
  kitchen: 'Whole kitchen',
  wall: 'Wall cabinets',
  base: 'Base cabinets',
  island: 'Island and peninsula',
  tall: 'Tall cabinets',
};

/** A part of the kitchen as the homeowner reads it. */
export const zoneWord = (zone: ZoneOrKitchen): string => ZONE_WORDS[zone];
