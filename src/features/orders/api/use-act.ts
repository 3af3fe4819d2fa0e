import { useMutation } from '@tanstack/react-query';
import { useRef } from 'react';
import { call, type Answer } from '@/lib/api';
import { problemCode } from '@/lib/query-client';
import { newKey } from '@/lib/server-answer';
import type { RouteName } from '@shared/routes';

type Args<N extends RouteName> = Parameters<typeof call<N>>[1];

/** A commit whose answer was lost is settled by asking again with the same key; any other answer ends the intent. */
const isAnswer = (error: unknown): boolean => {
  const code = problemCode(error);
  return code !== null && code !== 'database-unavailable';
};

/** One intended act at a time: the same request repeated after silence carries the same key, so it happens once. */
export function useAct<N extends RouteName>(name: N) {
  const intent = useRef<{ key: string; request: string } | null>(null);
  return useMutation<Answer<N>, Error, Args<N>>({
    mutationFn: async (args) => {
      const request = JSON.stringify(args);
      if (intent.current?.request !== request) intent.current = { key: newKey(), request };
      try {
        const answer = await call(name, { ...args, key: intent.current.key });
        intent.current = null;
        return answer;
      } catch (error) {
        if (isAnswer(error)) intent.current = null;
        throw error;
      }
    },
  });
}
