/*
 * What the people of the story upload: an invented hopper, small enough to be added up by hand, with an asymmetric fit and a tilted
 * body axis so that no product of inertia is zero. Pounds and inches, products with the sign of the tensor element.
 */

export const LIST_DECLARATIONS = {
  mass_unit: 'lb',
  length_unit: 'in',
  inertia_unit: 'lb.in2',
  products: 'negative',
} as const;

/** As the frame form takes them: metres and degrees. */
export const FRAME = { lemac: [6.3, 0, 1.4], mac: 1.9, span: 19.2, length: 14.6, incidence: 1.5 } as const;

const HEADER = 'item,group,mass,x,y,z,ixx,iyy,izz,ixy,ixz,iyz,symmetry,maturity,growth_percent,mass_sigma';

const BODY_AND_WING = `B-1,Body/Shell,2210.5,263.25,0,57.5,2250000,9870000,9640000,0,-118000,0,,C,2,22.5
W-1,Wing,402.75,262.125,98.5,68.25,1180000,96000,1262000,21000,4300,-1500,pair,C,3,4.5
W-2,Wing/Systems,88.125,271.5,61.75,66.125,4100,2300,5900,0,0,0,pair,E,12.5,2.25
T-1,Tail,311.5,566.75,0,148.5,88000,31000,104000,0,-9400,0,,C,4,`;

/** Two engines; the radar pod on the left tip has no moments of its own, which has to be answered. */
const FIT = `E-1,Power plant,905.25,224.75,112.5,71.625,61000,178000,171000,3100,-7700,900,pair,A,0,1.125
P-1,Equipment,63.75,249.25,-228.5,66.75,0,0,0,0,0,0,,E,15,1.75`;

export const RIGHT_LIST = `${HEADER}\n${BODY_AND_WING}\n${FIT}\n`;

/** The body's mass with a decimal comma, the tail without a station, and one item twice. */
export const WRONG_LIST = RIGHT_LIST.replace('2210.5', '"2210,5"')
  .replace('566.75', '')
  .replace('W-2', 'W-1');

/** The pod has moved inboard and been weighed. */
export const SECOND_LIST = RIGHT_LIST.replace(
  'P-1,Equipment,63.75,249.25,-228.5,66.75,0,0,0,0,0,0,,E,15,1.75',
  'P-1,Equipment,66.375,251.5,-171.25,64.125,190,2400,2350,0,35,0,,A,0,0.125',
);

export const ROTOR_INERTIA_UNIT = 'lb.ft2';
export const ROTORS = `rotor,polar_inertia,axis_yaw,axis_pitch,sense,gear_ratio,shaft
left propeller,118.5,-1.5,2,cw,0.0625,left engine
right propeller,118.5,1.5,2,cw,0.0625,right engine
left turbine,2.375,-1.5,2,ccw,1,left engine
`;
export const POINTS = `point,title,shaft,rpm
take-off,Take-off,left engine,19200
take-off,Take-off,right engine,19200
ferry,Left engine stopped,left engine,0
ferry,Left engine stopped,right engine,17600
`;

/** The second condition: a box on the right-hand side of the cabin, kg and m. */
export const BOX = { name: 'Spares box', mass: '181.4', x: '5.6', y: '0.45', z: '1.1' } as const;
