import type { BodyRegion, PartKind } from '@/lib/physics/model/patient';
import type { Plane } from '@/lib/physics/model/prescription';
import type { Token } from './scene';

/**
 * A rounded shape in the frame of the body part it lies in: centre and semi-axes as shares of the part's half-breadth
 * and half-height on the screen. `corner` 2 is an ellipse, more is squarer; `through` runs the part's whole height.
 */
export interface Organ {
  readonly name: string;
  readonly at: readonly [number, number];
  readonly semi: readonly [number, number];
  readonly fill: Token;
  readonly corner?: number;
  readonly through?: boolean;
}

type Sketch = Partial<Record<PartKind, readonly Organ[]>>;

const organ = (name: string, at: Organ['at'], semi: Organ['semi'], fill: Token, more: Pick<Organ, 'corner' | 'through'> = {}): Organ => ({
  name, at, semi, fill, ...more,
});
/** A column along the body: spine, shaft, vessel. */
const column = (name: string, at: number, half: number, fill: Token): Organ =>
  organ(name, [at, 0], [half, 0.97], fill, { corner: 8, through: true });
const both = (name: string, [u, v]: Organ['at'], semi: Organ['semi'], fill: Token, more: Pick<Organ, 'corner' | 'through'> = {}): Organ[] => [
  organ(`right ${name}`, [-u, v], semi, fill, more),
  organ(`left ${name}`, [u, v], semi, fill, more),
];

const ROUND_WALL = organ('wall', [0, 0.03], [0.82, 0.76], 'tissue-lean');
const LONG_WALL = column('wall', 0, 0.82, 'tissue-lean');
const ARM = [organ('arm bone', [0, 0], [0.26, 0.26], 'tissue-bone')];
const LONG_ARM = [column('arm bone', 0, 0.24, 'tissue-bone')];

/** Right of the patient on the left, anterior on top; sagittal: anterior on the left. To find one's way by, not a measurement. */
const ABDOMEN: Record<Plane, Sketch> = {
  axial: {
    trunk: [
      ROUND_WALL,
      organ('liver', [-0.32, -0.13], [0.4, 0.44], 'tissue-organ'),
      organ('stomach and spleen', [0.47, -0.06], [0.14, 0.26], 'tissue-gland'),
      organ('right kidney', [-0.38, 0.34], [0.11, 0.2], 'tissue-gland'),
      organ('left kidney', [0.36, 0.37], [0.11, 0.2], 'tissue-gland'),
      organ('vena cava', [-0.07, 0.24], [0.06, 0.065], 'tissue-vessel'),
      organ('aorta', [0.05, 0.25], [0.055, 0.075], 'tissue-vessel'),
      organ('spine', [0, 0.48], [0.135, 0.155], 'tissue-bone'),
    ],
    arm: ARM,
  },
  coronal: {
    trunk: [
      LONG_WALL,
      column('spine', 0, 0.1, 'tissue-bone'),
      organ('liver', [-0.34, -0.3], [0.4, 0.26], 'tissue-organ'),
      organ('stomach and spleen', [0.48, -0.34], [0.15, 0.19], 'tissue-gland'),
      organ('right kidney', [-0.36, 0.16], [0.12, 0.18], 'tissue-gland'),
      organ('left kidney', [0.36, 0.1], [0.12, 0.18], 'tissue-gland'),
    ],
    arm: LONG_ARM,
  },
  sagittal: {
    trunk: [
      LONG_WALL,
      column('spine', 0.48, 0.15, 'tissue-bone'),
      column('aorta', 0.24, 0.05, 'tissue-vessel'),
      organ('liver', [-0.26, -0.34], [0.4, 0.28], 'tissue-organ'),
      organ('bowel', [-0.32, 0.34], [0.34, 0.32], 'tissue-gland'),
    ],
    arm: LONG_ARM,
  },
};

const PELVIS: Record<Plane, Sketch> = {
  axial: {
    trunk: [
      ROUND_WALL,
      ...both('hip bone', [0.52, 0.06], [0.11, 0.34], 'tissue-bone'),
      organ('bladder', [0, -0.2], [0.25, 0.22], 'tissue-organ'),
      organ('womb or prostate', [0, 0.12], [0.19, 0.13], 'tissue-gland'),
      organ('rectum', [0, 0.34], [0.1, 0.1], 'tissue-vessel'),
      organ('sacrum', [0, 0.57], [0.22, 0.12], 'tissue-bone'),
    ],
    arm: ARM,
    leg: [organ('thigh muscle', [0, 0], [0.74, 0.74], 'tissue-lean'), organ('thigh bone', [0, 0], [0.2, 0.2], 'tissue-bone')],
  },
  coronal: {
    trunk: [
      LONG_WALL,
      organ('sacrum', [0, -0.5], [0.17, 0.3], 'tissue-bone', { corner: 3 }),
      ...both('hip bone', [0.48, -0.32], [0.17, 0.36], 'tissue-bone'),
      ...both('head of the thigh bone', [0.56, 0.14], [0.12, 0.12], 'tissue-bone'),
      ...both('thigh bone', [0.6, 0.58], [0.07, 0.38], 'tissue-bone', { corner: 5 }),
      organ('bladder', [0, 0.12], [0.25, 0.2], 'tissue-organ'),
    ],
    arm: LONG_ARM,
    leg: [column('thigh muscle', 0, 0.74, 'tissue-lean'), column('thigh bone', 0, 0.16, 'tissue-bone')],
  },
  sagittal: {
    trunk: [
      LONG_WALL,
      organ('sacrum', [0.52, -0.3], [0.14, 0.46], 'tissue-bone', { corner: 3 }),
      organ('rectum', [0.26, 0.12], [0.08, 0.4], 'tissue-vessel', { corner: 3 }),
      organ('bladder', [-0.3, 0.14], [0.24, 0.18], 'tissue-organ'),
      organ('womb or prostate', [0.02, 0.08], [0.14, 0.2], 'tissue-gland'),
      organ('pubic bone', [-0.56, 0.34], [0.08, 0.12], 'tissue-bone'),
    ],
    arm: LONG_ARM,
    leg: [column('thigh muscle', 0, 0.74, 'tissue-lean'), column('thigh bone', 0, 0.16, 'tissue-bone')],
  },
};

const CHEST: Record<Plane, Sketch> = {
  axial: {
    trunk: [
      organ('wall', [0, 0.02], [0.88, 0.84], 'tissue-lean'),
      ...both('lung', [0.42, -0.02], [0.34, 0.58], 'paper'),
      organ('heart', [0.14, -0.2], [0.27, 0.3], 'tissue-organ'),
      organ('aorta', [0.13, 0.32], [0.065, 0.09], 'tissue-vessel'),
      organ('spine', [0, 0.54], [0.13, 0.17], 'tissue-bone'),
    ],
    arm: ARM,
  },
  coronal: {
    trunk: [
      column('wall', 0, 0.88, 'tissue-lean'),
      ...both('lung', [0.44, -0.18], [0.33, 0.62], 'paper', { corner: 2.6 }),
      organ('heart', [0.14, 0.12], [0.28, 0.27], 'tissue-organ'),
      organ('liver', [-0.3, 0.68], [0.46, 0.24], 'tissue-organ'),
    ],
    arm: LONG_ARM,
  },
  sagittal: {
    trunk: [
      column('wall', 0, 0.88, 'tissue-lean'),
      organ('lung', [-0.06, -0.16], [0.6, 0.66], 'paper', { corner: 2.6 }),
      column('spine', 0.66, 0.13, 'tissue-bone'),
      organ('heart', [-0.26, 0.16], [0.28, 0.26], 'tissue-organ'),
      organ('breastbone', [-0.76, -0.12], [0.05, 0.5], 'tissue-bone', { corner: 4 }),
    ],
    arm: LONG_ARM,
  },
};

const HEAD: Record<Plane, Sketch> = {
  axial: {
    head: [
      organ('skull', [0, 0], [0.92, 0.93], 'tissue-bone'),
      organ('fluid', [0, 0], [0.84, 0.86], 'paper'),
      ...both('half of the brain', [0.4, 0], [0.38, 0.76], 'tissue-gland'),
      ...both('ventricle', [0.11, -0.04], [0.06, 0.24], 'paper'),
    ],
    trunk: [organ('wall', [0, 0], [0.82, 0.76], 'tissue-lean')],
    arm: ARM,
  },
  coronal: {
    head: [
      organ('skull', [0, -0.02], [0.92, 0.92], 'tissue-bone'),
      organ('fluid', [0, -0.06], [0.84, 0.82], 'paper'),
      ...both('half of the brain', [0.39, -0.2], [0.37, 0.58], 'tissue-gland'),
      organ('brain stem', [0, 0.42], [0.12, 0.3], 'tissue-organ'),
      ...both('half of the small brain', [0.26, 0.48], [0.22, 0.16], 'tissue-organ'),
    ],
    trunk: [LONG_WALL],
    arm: LONG_ARM,
  },
  sagittal: {
    head: [
      organ('skull', [0, -0.02], [0.92, 0.92], 'tissue-bone'),
      organ('fluid', [0.05, -0.14], [0.82, 0.74], 'paper'),
      organ('brain', [0.05, -0.22], [0.76, 0.56], 'tissue-gland'),
      organ('small brain', [0.4, 0.34], [0.26, 0.19], 'tissue-organ'),
      organ('brain stem', [0.12, 0.5], [0.09, 0.3], 'tissue-organ'),
      organ('nose and mouth', [-0.4, 0.56], [0.22, 0.2], 'tissue-lean'),
    ],
    trunk: [LONG_WALL],
    arm: LONG_ARM,
  },
};

const KNEE: Record<Plane, Sketch> = {
  axial: {
    leg: [
      organ('muscle', [0, 0], [0.86, 0.86], 'tissue-lean'),
      ...both('condyle', [0.3, 0.02], [0.36, 0.44], 'tissue-bone'),
      organ('kneecap', [0, -0.6], [0.3, 0.15], 'tissue-bone'),
      organ('vessels', [0.04, 0.64], [0.1, 0.09], 'tissue-vessel'),
    ],
  },
  coronal: {
    leg: [
      column('muscle', 0, 0.84, 'tissue-lean'),
      organ('thigh bone', [0, -0.66], [0.28, 0.6], 'tissue-bone', { corner: 6 }),
      ...both('condyle', [0.32, -0.16], [0.38, 0.2], 'tissue-bone', { corner: 2.6 }),
      organ('head of the shin bone', [0, 0.2], [0.68, 0.14], 'tissue-bone', { corner: 3.5 }),
      organ('shin bone', [0, 0.7], [0.3, 0.6], 'tissue-bone', { corner: 6 }),
    ],
  },
  sagittal: {
    leg: [
      column('muscle', 0, 0.84, 'tissue-lean'),
      organ('thigh bone', [0.06, -0.66], [0.26, 0.6], 'tissue-bone', { corner: 6 }),
      organ('condyle', [0.12, -0.16], [0.5, 0.21], 'tissue-bone', { corner: 2.4 }),
      organ('head of the shin bone', [0.08, 0.2], [0.52, 0.14], 'tissue-bone', { corner: 3.5 }),
      organ('shin bone', [0, 0.7], [0.28, 0.6], 'tissue-bone', { corner: 6 }),
      organ('kneecap', [-0.62, -0.2], [0.13, 0.19], 'tissue-bone'),
    ],
  },
};

const SHOULDER: Record<Plane, Sketch> = {
  axial: {
    trunk: [
      organ('muscle', [0, 0.02], [0.9, 0.78], 'tissue-lean'),
      ...both('lung', [0.32, 0.02], [0.22, 0.44], 'paper'),
      ...both('head of the arm bone', [0.72, -0.02], [0.11, 0.24], 'tissue-bone'),
      ...both('shoulder blade', [0.6, 0.3], [0.05, 0.18], 'tissue-bone'),
      organ('spine', [0, 0.44], [0.1, 0.17], 'tissue-bone'),
    ],
    arm: ARM,
    head: [organ('skull', [0, 0], [0.9, 0.9], 'tissue-bone'), organ('brain', [0, 0], [0.8, 0.8], 'tissue-gland')],
  },
  coronal: {
    trunk: [
      organ('muscle', [0, 0.04], [0.9, 0.8], 'tissue-lean'),
      ...both('lung', [0.3, 0.5], [0.22, 0.42], 'paper'),
      ...both('head of the arm bone', [0.76, 0.04], [0.1, 0.16], 'tissue-bone'),
      ...both('arm bone', [0.8, 0.5], [0.05, 0.36], 'tissue-bone', { corner: 5 }),
      organ('spine', [0, 0.4], [0.08, 0.54], 'tissue-bone', { corner: 8 }),
    ],
    arm: LONG_ARM,
    head: [organ('skull', [0, 0], [0.9, 0.9], 'tissue-bone'), organ('brain', [0, 0], [0.8, 0.8], 'tissue-gland')],
  },
  sagittal: {
    trunk: [
      organ('muscle', [0, 0.3], [0.74, 0.62], 'tissue-lean', { corner: 3 }),
      organ('head of the arm bone', [-0.06, 0.02], [0.26, 0.2], 'tissue-bone'),
      organ('arm bone', [-0.06, 0.5], [0.12, 0.36], 'tissue-bone', { corner: 5 }),
      organ('shoulder blade', [0.4, 0.2], [0.12, 0.3], 'tissue-bone'),
    ],
    arm: LONG_ARM,
    head: [organ('skull', [0, 0], [0.9, 0.9], 'tissue-bone'), organ('brain', [0, 0], [0.8, 0.8], 'tissue-gland')],
  },
};

const GLAND = [organ('gland', [0, 0.05], [0.62, 0.62], 'tissue-gland')];
const withGland = (sketch: Sketch): Sketch => ({ ...sketch, breast: GLAND });
const BREAST: Record<Plane, Sketch> = { axial: withGland(CHEST.axial), coronal: withGland(CHEST.coronal), sagittal: withGland(CHEST.sagittal) };

export const SKETCHES: Readonly<Record<BodyRegion, Readonly<Record<Plane, Sketch>>>> = {
  abdomen: ABDOMEN,
  pelvis: PELVIS,
  chest: CHEST,
  head: HEAD,
  shoulder: SHOULDER,
  hip: PELVIS,
  knee: KNEE,
  breast: BREAST,
};

/** Along the body a part reaches as far as coil and magnet see; its organs lie within this of the origin, mm. */
export const HALF_LENGTH_MM: Readonly<Record<BodyRegion, number>> = {
  abdomen: 230, pelvis: 190, chest: 210, head: 150, shoulder: 180, hip: 190, knee: 130, breast: 210,
};
