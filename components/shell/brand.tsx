const ELLIPSOID =
  'M24.0 10.0 23.9 8.6 23.5 7.4 22.8 6.2 21.9 5.1 20.8 4.2 19.5 3.4 18.0 2.8 16.4 2.5 14.7 2.3 13.0 2.3 11.3 2.6 9.6 3.1 8.0 3.8 6.5 4.6 5.2 5.6 4.1 6.7 3.2 8.0 2.5 9.3 2.1 10.7 2.0 12.0 2.1 13.4 2.5 14.6 3.2 15.8 4.1 16.9 5.2 17.8 6.5 18.6 8.0 19.2 9.6 19.5 11.3 19.7 13.0 19.7 14.7 19.4 16.4 18.9 18.0 18.2 19.5 17.4 20.8 16.4 21.9 15.3 22.8 14.0 23.5 12.7 23.9 11.3Z';
const POLHODE =
  'M15.9 15.1 15.7 14.5 15.1 13.9 14.1 13.3 12.9 12.8 11.6 12.3 10.1 11.9 8.6 11.5 7.2 11.2 5.9 10.9 4.8 10.8 3.8 10.7 3.1 10.7 2.5 10.8 2.2 11.1 2.0 11.5 2.0 12.1 2.0 12.9 2.2 13.8 2.5 14.7 3.1 15.7 3.8 16.6 4.8 17.3 5.9 17.9 7.2 18.3 8.6 18.5 10.1 18.5 11.6 18.2 12.9 17.8 14.1 17.2 15.1 16.6 15.7 15.9Z';
const SPIN_AXIS = 'M6.4 15.3 3.4 17.2';

/** The mark: an inertia ellipsoid of semi-axes 10, 7.7 and 6, one polhode on it and the axis it goes around, computed. */
export function BrandMark({ size = 28 }: { readonly size?: number }) {
  return (
    <svg
      width={size}
      height={(size * 22) / 26}
      viewBox="0 0 26 22"
      aria-hidden="true"
      className="shrink-0 overflow-visible fill-none stroke-current"
    >
      <path d={ELLIPSOID} strokeWidth="1.25" />
      <path d={POLHODE} strokeWidth="2" className="stroke-spin" />
      <path d={SPIN_AXIS} strokeWidth="1.25" />
    </svg>
  );
}
