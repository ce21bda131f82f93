const OUTLINE =
  'M21.9 11.2 21.6 9.7 20.9 8.2 19.7 6.9 18.2 5.9 16.3 5.2 14.2 4.8 12.0 4.8 9.8 5.1 7.7 5.8 5.8 6.8 4.3 8.1 3.1 9.6 2.4 11.1 2.1 12.8 2.4 14.3 3.1 15.8 4.3 17.1 5.8 18.1 7.7 18.8 9.8 19.2 12.0 19.2 14.2 18.9 16.3 18.2 18.2 17.2 19.7 15.9 20.9 14.4 21.6 12.9Z';
const POLHODES = [
  'M12.6 15.4 12.4 14.8 11.7 14.3 10.8 13.8 9.6 13.3 8.3 12.9 7.0 12.5 5.7 12.1 4.6 11.8 3.7 11.6 3.0 11.6 2.6 11.6 2.3 11.8 2.2 12.1 2.1 12.6 2.2 13.3 2.3 14.1 2.6 14.9 3.0 15.7 3.7 16.4 4.6 17.0 5.7 17.4 7.0 17.6 8.3 17.6 9.6 17.4 10.8 17.1 11.7 16.6 12.4 16.0Z',
  'M8.4 15.5 8.3 15.2 8.0 14.9 7.6 14.6 7.1 14.3 6.5 14.0 5.9 13.8 5.3 13.6 4.7 13.4 4.2 13.4 3.7 13.4 3.4 13.4 3.1 13.6 3.0 13.8 2.9 14.1 3.0 14.4 3.1 14.8 3.4 15.1 3.7 15.5 4.2 15.8 4.7 16.1 5.3 16.3 5.9 16.4 6.5 16.5 7.1 16.4 7.6 16.3 8.0 16.1 8.3 15.8Z',
];

/** The mark: an ellipsoid's outline and two polhodes on it, computed for semi-axes 10, 8 and 6. Drawn in the ink around it. */
export function BrandMark({ size = 24 }: { readonly size?: number }) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 24 24"
      aria-hidden="true"
      className="shrink-0 fill-none stroke-current"
    >
      <path d={OUTLINE} strokeWidth="1" />
      {POLHODES.map((curve) => (
        <path key={curve} d={curve} strokeWidth="1.5" className="stroke-spin" />
      ))}
    </svg>
  );
}
