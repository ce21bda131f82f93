/** Where a shaft points: an arrow in airframe components with the hand of the spin about it, or angles from straight forward, rad. */
export type SpinAxis =
  | {
      readonly kind: 'arrow';
      readonly x: number;
      readonly y: number;
      readonly z: number;
      readonly hand: 'rh' | 'lh';
    }
  | { readonly kind: 'angles'; readonly yaw: number; readonly pitch: number; readonly sense: 'cw' | 'ccw' };

/** A rotating part. `polarInertia` about the spin axis in kg.m2; `gearRatio` is rotor speed over shaft speed, > 0. */
export interface Rotor {
  readonly rotor: string;
  readonly polarInertia: number;
  readonly axis: SpinAxis;
  readonly gearRatio: number;
  readonly shaft: string;
  readonly component: string | null;
  readonly blades: number | null;
  readonly polarInertiaSigma: number | null;
  readonly group: string | null;
  readonly note: string | null;
}

/** A named engine and propeller state. Shaft speeds in rad/s; a negative speed turns the other way. */
export interface OperatingPoint {
  readonly code: string;
  readonly title: string;
  readonly speeds: readonly ShaftSpeed[];
}

export interface ShaftSpeed {
  readonly shaft: string;
  readonly speed: number;
  readonly sigma: number | null;
}
