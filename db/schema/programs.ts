import { type Generated } from 'kysely';
import { type Direction } from '@/lib/frames/axes';
import { type GroupChangeKind } from '@/lib/groups/breakdown';
import { type LimitKind, type LimitQuantity, type LimitSense } from '@/lib/loading/limits';
import { type Maturity } from '@/lib/mass/component';
import { type MemberRole } from '@/lib/permissions';

export type BuildKind = 'design' | 'as-built' | 'as-weighed';

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

/**
 * Insert-only. How the frame of the issue before lies in this one: its datum (m) in the components of this issue, and yaw, pitch,
 * roll (rad) as of a list's frame. A first issue has none, and no issue made before this was asked for.
 */
export interface FrameStepsTable {
  frame_issue_id: string;
  origin: number[];
  turn: number[];
  stated_by: string;
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

/** `value` in SI, `percentMac` in % of the mean chord. `group_path` '' is the whole aircraft, no `condition_code` every condition. */
export interface LimitsTable {
  id: string;
  program_id: string;
  quantity: LimitQuantity;
  sense: LimitSense;
  group_path: string;
  condition_code: string | null;
  /** The issue whose axes a limit of `cgx`, `cgy` or `cgz` is stated in. */
  frame_issue_id: string | null;
  valid_from: string;
  valid_until: string | null;
  kind: LimitKind;
  value: number;
  source: string;
  source_date: string;
  created_by: string;
  created_at: Generated<Date>;
}

/** `group_path` '' is the program's own. */
export interface GrowthAllowancesTable {
  program_id: string;
  group_path: string;
  maturity: Maturity;
  fraction: number;
  source: string;
}

/** Insert-only. `number` counts within the program. */
export interface GroupChangesTable {
  program_id: string;
  number: number;
  kind: GroupChangeKind;
  path: string;
  to_path: string | null;
  code: string | null;
  changed_by: string;
  changed_at: Generated<Date>;
}
