import { type Generated } from 'kysely';
import { type Finding, type PlacedFinding } from '@/lib/findings/finding';
import { type ConfigurationResult } from '@/lib/loading/configuration';
import { type Category } from '@/lib/mass/component';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { type Json } from './lists';

/**
 * Insert-only: the rotating parts and operating points of a program as they stood. SI; directions in airframe components of
 * `frame_issue_id`, which is null where they were made before the program's first issue and so in whatever one came.
 */
export interface RotorRevisionsTable {
  id: string;
  program_id: string;
  frame_issue_id: string | null;
  number: number;
  reason: string;
  rotors: Json<Rotor[]>;
  points: Json<OperatingPoint[]>;
  findings: Json<Finding[]>;
  file_sha256: string | null;
  file_name: string | null;
  created_by: string;
  created_at: Generated<Date>;
}

/** `version` counts every change, so that a roll-up knows whether its inputs still stand. */
export interface ConfigurationsTable {
  id: string;
  program_id: string;
  build_id: string;
  frame_issue_id: string;
  code: string;
  title: string;
  rotor_revision_id: string | null;
  version: Generated<number>;
  created_by: string;
  created_at: Generated<Date>;
}

export interface ConfigurationListsTable {
  configuration_id: string;
  list_id: string;
  revision_id: string;
}

export interface ConditionsTable {
  id: string;
  configuration_id: string;
  code: string;
  title: string;
  position: number;
  /** Categories of list rows that are on board. */
  categories: Generated<Category[]>;
}

/** A named item on board: kg, place in airframe components in m, a point mass. */
export interface ConditionItemsTable {
  condition_id: string;
  position: number;
  name: string;
  category: Category;
  mass: number;
  place: number[];
}

export interface RollUpsTable {
  id: string;
  configuration_id: string;
  configuration_version: number;
  input_sha256: string;
  result: Json<ConfigurationResult>;
  findings: Json<PlacedFinding[]>;
  created_by: string;
  created_at: Generated<Date>;
}
