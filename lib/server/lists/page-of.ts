/** Which part of a long list an address asks for with `page`, counted from 1, and the way to its neighbours. */
export function pageOf(
  asked: string | readonly string[] | undefined,
  total: number,
  perPage: number,
  address: string,
) {
  const wanted = typeof asked === 'string' && /^[1-9]\d{0,6}$/.test(asked) ? Number(asked) : 1;
  const last = Math.max(1, Math.ceil(total / perPage));
  const page = Math.min(wanted, last);
  const offset = (page - 1) * perPage;
  return {
    offset,
    words: {
      from: Math.min(total, offset + 1),
      to: Math.min(total, offset + perPage),
      total,
      previousHref: page > 1 ? `${address}page=${page - 1}` : null,
      nextHref: page < last ? `${address}page=${page + 1}` : null,
    },
  };
}
