import { useQuery } from '@tanstack/react-query';
import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { queryClient } from '#src/components/ui/query-client.ts';

function Record({ secret }: { secret: string }) {
  const { data } = useQuery({ queryKey: ['record'], queryFn: () => secret, initialData: secret }, queryClient);
  return <p>{data}</p>;
}

test('a page drawn on the server leaves nothing for the page of the next reader', () => {
  expect(renderToStaticMarkup(<Record secret="for the first" />)).toBe('<p>for the first</p>');
  expect(renderToStaticMarkup(<Record secret="for the second" />)).toBe('<p>for the second</p>');
  expect(queryClient.getQueryCache().getAll()).toEqual([]);
});
