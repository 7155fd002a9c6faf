import { stageTemplates } from '../model/stage-templates.ts';
import { useEditor } from './editor-context.ts';

const unique = (words: readonly (string | null)[]): string[] =>
  [...new Set(words.filter((word) => word !== null))].sort();

/** Words that fields propose while one types: what the roster and this sheet have already. */
export function Suggestions() {
  const { body, ground } = useEditor();
  const ways = body.stages.flatMap((stage) => stage.ways);
  const lists = {
    skills: unique([...(ground?.skills.map(({ skill }) => skill) ?? []), ...ways.map(({ skill }) => skill)]),
    families: unique(['primer', 'colour', ...ways.map(({ family }) => family)]),
    loads: unique(ways.map(({ load }) => load)),
    'stage-kinds': unique([...stageTemplates.map(({ kind }) => kind), ...body.stages.map(({ kind }) => kind)]),
  };
  return Object.entries(lists).map(([id, words]) => (
    <datalist key={id} id={id}>
      {words.map((word) => (
        <option key={word} value={word} />
      ))}
    </datalist>
  ));
}
