import { type ProgramAction } from '@/lib/permissions';

/** The stations of a program, in the direction of its data; each is shown to those who may do its action. */
export const STATIONS = [
  { code: 'lists', title: 'Lists', action: 'lists.read' },
  { code: 'rotating-parts', title: 'Rotating parts', action: 'rotors.read' },
  { code: 'configurations', title: 'Configurations', action: 'configurations.read' },
  { code: 'baselines', title: 'Baselines', action: 'baselines.read' },
  { code: 'hand-off', title: 'Hand-off', action: 'baselines.read' },
] as const satisfies readonly { code: string; title: string; action: ProgramAction }[];

export type StationCode = (typeof STATIONS)[number]['code'];
