/**
 * Top groups of a fixed-wing aircraft's mass breakdown as the open literature names them, offered as a start and nothing more.
 * From memory: group mass statements of this kind stand in D. P. Raymer, Aircraft Design: A Conceptual Approach (chapter on
 * weights), J. Roskam, Airplane Design, Part V, and E. Torenbeek, Synthesis of Subsonic Airplane Design (chapter 8). Codes are ours.
 */
export const USUAL_GROUPS: readonly {
  readonly path: string;
  readonly code: string;
  readonly holds: string;
}[] = [
  { path: 'Wing', code: '10', holds: 'Box, leading and trailing edges, control surfaces carried by it' },
  { path: 'Tail', code: '20', holds: 'Horizontal and vertical surfaces' },
  { path: 'Body', code: '30', holds: 'Fuselage shell, floors, doors, windows' },
  { path: 'Alighting gear', code: '40', holds: 'Main and nose legs, wheels, brakes' },
  { path: 'Nacelles', code: '50', holds: 'Cowls, pylons, engine mounts' },
  { path: 'Propulsion', code: '60', holds: 'Engines, propellers, their systems, fuel system' },
  { path: 'Flight controls', code: '70', holds: 'Cockpit controls, linkages, actuators' },
  { path: 'Auxiliary power', code: '75', holds: 'Auxiliary power unit and its installation' },
  { path: 'Instruments and avionics', code: '80', holds: 'Instruments, communication, navigation' },
  { path: 'Hydraulics', code: '82', holds: 'Pumps, lines, reservoirs, fluid' },
  { path: 'Electrical', code: '84', holds: 'Generation, distribution, batteries, lighting' },
  {
    path: 'Air conditioning and anti-icing',
    code: '86',
    holds: 'Conditioning, pressurisation, ice protection',
  },
  { path: 'Furnishings and equipment', code: '90', holds: 'Seats, linings, galleys, emergency equipment' },
  { path: 'Operating items', code: '95', holds: 'Crew, unusable fluids, removable equipment' },
];
