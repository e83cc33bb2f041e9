import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { marginScatterSchema, type MarginScatter } from '../../contract/margins';
import { marginListSchema, type MarginList, type MarginRow } from '../../contract/standing';
import { rowsOfPages } from '../../view/margin-order';
import { marginFilterParameters, marginListParameters, type MarginAddress } from '../../view/margin-query';
import { apiRequest } from '../shell/api-request';

/** The findings are renewed once an hour; the stream moves utilisation on meanwhile. */
const FRESH_MS = 5 * 60_000;

export interface MarginPages {
  readonly rows: readonly MarginRow[];
  readonly total: number;
  readonly hasMore: boolean;
  readonly error: Error | null;
  /** rows of an older question are still shown */
  readonly isOld: boolean;
  readonly isFetchingMore: boolean;
  more(): void;
  tryAgain(): void;
}

/** The fleet page by page; the first page came with the document when it was asked for there. */
export function useMargins(
  address: MarginAddress,
  initial: { readonly list: MarginList; readonly search: string },
): MarginPages {
  const asked = marginListParameters(address).toString();
  const query = useInfiniteQuery({
    queryKey: ['margins', asked],
    queryFn: ({ pageParam, signal }) => {
      const parameters = new URLSearchParams(asked);
      if (pageParam !== null) parameters.set('after', pageParam);
      return apiRequest(`/api/margins?${parameters}`, { answer: marginListSchema, signal });
    },
    initialPageParam: null as string | null,
    getNextPageParam: (last: MarginList) => last.next,
    ...(asked === initial.search ? { initialData: { pages: [initial.list], pageParams: [null] } } : {}),
    placeholderData: keepPreviousData,
    staleTime: FRESH_MS,
    retry: false,
  });
  const pages = query.data?.pages ?? [];
  return {
    rows: rowsOfPages(pages),
    total: pages[0]?.total ?? 0,
    hasMore: query.hasNextPage,
    error: query.error,
    isOld: query.isPlaceholderData,
    isFetchingMore: query.isFetchingNextPage,
    more: () => void query.fetchNextPage(),
    tryAgain: () => void query.refetch(),
  };
}

export function useScatter(address: MarginAddress): {
  readonly scatter: MarginScatter | undefined;
  readonly error: Error | null;
  tryAgain(): void;
} {
  const asked = marginFilterParameters(address).toString();
  const { data, error, refetch } = useQuery({
    queryKey: ['margin-scatter', asked],
    queryFn: ({ signal }) =>
      apiRequest(`/api/margins/scatter?${asked}`, { answer: marginScatterSchema, signal }),
    placeholderData: keepPreviousData,
    staleTime: FRESH_MS,
    retry: false,
  });
  return { scatter: data, error, tryAgain: () => void refetch() };
}
