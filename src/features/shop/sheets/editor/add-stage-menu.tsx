import { Plus } from 'lucide-react';
import { Button } from '#src/ui/button.tsx';
import { Menu, MenuItem, MenuLabel, MenuLine } from '#src/ui/menu.tsx';
import { putStage } from '../model/body-edits.ts';
import { freeKey } from '../model/keys.ts';
import { stageFrom, stageTemplates } from '../model/stage-templates.ts';
import { byHand } from '../model/way-templates.ts';
import { useEditor } from './editor-context.ts';

const groups = ['Hand work', 'Coats', 'Cures'] as const;

/** Adds a stage of a usual kind, filled from the data sheets, behind the chosen one or at the end. */
export function AddStageMenu({ after }: { after: string | null }) {
  const { body, coatings, edit, open } = useEditor();
  const chosen = body.stages.findIndex(({ key }) => key === after);
  const at = chosen < 0 ? body.stages.length : chosen + 1;
  const add = (stage: (typeof body.stages)[number]) => {
    edit(putStage(stage, at));
    open(stage.key);
  };
  return (
    <Menu
      align="start"
      trigger={
        <Button className="self-start" icon={<Plus size={16} aria-hidden="true" />} disabled={body.stages.length >= 60}>
          Add a stage
        </Button>
      }
    >
      {groups.map((group) => (
        <div key={group}>
          <MenuLabel>{group}</MenuLabel>
          {stageTemplates
            .filter((template) => template.group === group)
            .map((template) => (
              <MenuItem key={template.id} onSelect={() => add(stageFrom(template, body, at, coatings))}>
                {template.label}
              </MenuItem>
            ))}
        </div>
      ))}
      <MenuLine />
      <MenuItem
        onSelect={() =>
          add({
            key: freeKey(
              'stage',
              body.stages.map(({ key }) => key),
            ),
            kind: 'other',
            title: 'New stage',
            option: null,
            coatingId: null,
            ways: [byHand(30)],
          })
        }
      >
        Something else, by hand
      </MenuItem>
    </Menu>
  );
}
