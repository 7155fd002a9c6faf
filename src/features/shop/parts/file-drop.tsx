import { FileUp } from 'lucide-react';
import { useRef, useState, type DragEvent } from 'react';
import { cx } from '#src/lib/cx.ts';
import { Button } from '#src/ui/button.tsx';

type FileDropProps = { label: string; onFile: (file: File) => void; again?: boolean; accept?: string };

/** A place to drop a file on, with a button that does the same from the keyboard. */
export function FileDrop({ label, onFile, again = false, accept = '.csv,.txt,.tsv,text/csv' }: FileDropProps) {
  const input = useRef<HTMLInputElement>(null);
  const [isOver, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const [file] = event.dataTransfer.files;
    if (file) onFile(file);
  };
  return (
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={cx(
        'flex flex-wrap items-center gap-x-4 gap-y-2 rounded border border-dashed p-4',
        isOver ? 'border-ember bg-ember-soft' : 'border-edge',
      )}
    >
      <input
        ref={input}
        type="file"
        accept={accept}
        aria-label={label}
        className="sr-only"
        tabIndex={-1}
        onChange={(event) => {
          const [file] = event.target.files ?? [];
          if (file) onFile(file);
          // So that the same file, put right, can be chosen again.
          event.target.value = '';
        }}
      />
      <Button icon={<FileUp size={16} aria-hidden="true" />} onClick={() => input.current?.click()}>
        {again ? 'Choose another file' : 'Choose a file'}
      </Button>
      <p className="text-muted">or drop it here</p>
    </div>
  );
}
