import { Upload } from 'lucide-react';
import { useId, useState } from 'react';
import { buttonClass } from '#src/components/ui/Button.tsx';

interface DropZoneProps {
  onFiles: (files: File[]) => void;
  /** Small, once a file is being worked on. */
  isSmall: boolean;
}

/** Files dropped here, or chosen by the button; several are taken one after another. */
export function DropZone({ onFiles, isSmall }: DropZoneProps) {
  const id = useId();
  const [isOver, setIsOver] = useState(false);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is an extra; the button beside it does the same
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setIsOver(true);
      }}
      onDragLeave={() => setIsOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setIsOver(false);
        onFiles([...event.dataTransfer.files]);
      }}
      className={`flex flex-wrap items-center gap-x-4 gap-y-2 border border-dashed px-5 ${isSmall ? 'py-3' : 'py-9'} ${isOver ? 'border-zaffre bg-zaffre-wash' : 'border-edge bg-glaze'}`}
    >
      <Upload aria-hidden="true" size={20} className="text-ink-soft" />
      <label
        htmlFor={id}
        className={`${buttonClass(isSmall ? 'plain' : 'primary')} cursor-pointer has-focus-visible:outline-2`}
      >
        {isSmall ? 'Add files' : 'Choose files'}
        <input
          id={id}
          type="file"
          multiple
          className="sr-only"
          onChange={(event) => {
            onFiles([...(event.currentTarget.files ?? [])]);
            event.currentTarget.value = '';
          }}
        />
      </label>
      <p className="min-w-0 flex-1 text-ink-soft">
        or drop them here. JCAMP-DX, or text in columns, as the instrument wrote it; nothing is stored before you have
        seen how it was read.
      </p>
    </div>
  );
}
