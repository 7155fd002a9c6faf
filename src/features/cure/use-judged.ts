import { useEffect, useState } from 'react';
import type { JudgeAnswer, JudgeQuestion } from './model/trace-engine.ts';
import type { TraceDesk } from './trace-desk.ts';

export type JudgedState = { answer: JudgeAnswer | null; fault: string | null };

/** The answer to a question about a file. While a new one is on its way the old one stands. */
export function useJudged(desk: TraceDesk, question: JudgeQuestion): JudgedState {
  const [state, setState] = useState<JudgedState>({ answer: null, fault: null });
  const asked = JSON.stringify(question);
  useEffect(() => {
    let wanted = true;
    desk.judge(JSON.parse(asked) as JudgeQuestion).then(
      (answer) => wanted && setState({ answer, fault: null }),
      (error: unknown) =>
        wanted && setState({ answer: null, fault: error instanceof Error ? error.message : 'unknown fault' }),
    );
    return () => {
      wanted = false;
    };
  }, [desk, asked]);
  return state;
}
