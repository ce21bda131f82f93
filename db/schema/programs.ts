import { type Generated } from 'kysely';
import { type Direction } from '@/lib/frames/axes';
import { type Maturity } from '@/lib/mass/component';
import { type MemberRole } from '@/lib/permissions';

export type BuildKind = 'design' | 'as-built' | 'as-weighed';
export type LimitQuantity = 'cg-forward-percent-mac' | 'cg-aft-percent-mac' | 'mass-maximum';
export type LimitKind = 'contract' | 'specification' | 'target' | 'allocation';

export interface ProgramsTable {
  id: string;
  code: string;
  title: string;
  created_by: string;
  created_at: Generated<Date>;
}

export interface ProgramMembersTable {
  program_id: string;
  user_id: string;
  role: MemberRole;
  added_by: string;
  added_at: Generated<Date>;
}

/** Insert-only. Lengths in m, angles in rad, places in airframe components. */
export interface FrameIssuesTable {
  id: string;
  program_id: string;
  number: number;
  title: string;
  axis_x: Direction;
  axis_y: Direction;
  axis_z: Direction;
  lemac: number[];
  mac: number;
  span: number;
  length: number;
  lateral_plane: number;
  incidence: number;
  reference: number[];
  valid_from: string;
  reason: string;
  created_by: string;
  created_at: Generated<Date>;
}

export interface ReferencePointsTable {
  frame_issue_id: string;
  code: string;
  title: string;
  place: number[];
  created_by: string;
  created_at: Generated<Date>;
}

export interface BuildsTable {
  id: string;
  program_id: string;
  code: string;
  title: string;
  kind: BuildKind;
  serial_from: number | null;
  serial_to: number | null;
  is_default: Generated<boolean>;
  created_by: string;
  created_at: Generated<Date>;
}

/** `value` in SI: kg for masses, percent of the mean chord for CG limits. */
export interface LimitsTable {
  id: string;
  program_id: string;
  quantity: LimitQuantity;
  kind: LimitKind;
  value: number;
  source: string;
  source_date: string;
  created_by: string;
  created_at: Generated<Date>;
}

export interface GrowthAllowancesTable {
  program_id: string;
  maturity: Maturity;
  fraction: number;
  source: string;
}
