import { useState } from 'react';
import { showToast } from '#src/ui/toast-store.ts';
import { copyOfStage, moveStage, putStage, removeStage } from '../model/body-edits.ts';
import { useEditor } from './editor-context.ts';

/** Moving, copying and taking out stages, said out loud; what was taken out can be brought back from the toast. */
export function useStageDeeds() {
  const { body, edit, open } = useEditor();
  const [said, say] = useState('');
  const titleOf = (key: string): string => body.stages.find((stage) => stage.key === key)?.title ?? '';
  return {
    said,
    move: (key: string, to: number): void => {
      if (to < 0 || to >= body.stages.length) return;
      edit(moveStage(key, to));
      say(`${titleOf(key)} is now stage ${to + 1} of ${body.stages.length}.`);
    },
    copy: (key: string): void => {
      const copy = copyOfStage(body, key);
      if (!copy) return;
      edit(putStage(copy, body.stages.findIndex((stage) => stage.key === key) + 1));
      open(copy.key);
    },
    remove: (key: string): void => {
      const at = body.stages.findIndex((stage) => stage.key === key);
      const stage = body.stages[at];
      if (!stage) return;
      edit(removeStage(key));
      open((body.stages[at + 1] ?? body.stages[at - 1])?.key ?? null);
      const bringBack = () => {
        edit(putStage(stage, at));
        open(key);
      };
      showToast(`${stage.title} is taken out.`, { act: { label: 'Bring it back', run: bringBack } });
    },
  };
}
