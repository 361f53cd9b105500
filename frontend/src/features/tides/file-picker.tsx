import { useId, useState } from 'react';
import { readTableFile } from './read-table-file.ts';

/** Takes the text of a file from the reader's own computer; nothing is sent anywhere. */
export function FilePicker({ onRead }: { onRead: (text: string) => void }) {
  const id = useId();
  const [said, setSaid] = useState<{ readonly isWrong: boolean; readonly words: string } | null>(
    null,
  );
  const take = async (file: File): Promise<void> => {
    const read = await readTableFile(file);
    if (read.isRead) {
      setSaid({ isWrong: false, words: `${file.name} stands below.` });
      onRead(read.text);
    } else {
      setSaid({ isWrong: true, words: read.whyNot });
    }
  };
  return (
    <div>
      <label htmlFor={id} className="mb-0.5 block text-sm font-medium">
        A text file (CSV or plain text)
      </label>
      <input
        id={id}
        type="file"
        className="block w-full min-w-0 text-ui file:mr-3 file:min-h-9 file:rounded-md file:border-[1.5px] file:border-solid file:border-deep file:bg-transparent file:px-4 file:font-semibold file:text-deep hover:file:bg-wash max-wide:file:min-h-target"
        aria-describedby={`${id}-said`}
        aria-invalid={said?.isWrong === true ? true : undefined}
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file !== undefined) void take(file);
          // The same file, mended meanwhile, can be chosen again.
          event.target.value = '';
        }}
      />
      <p
        id={`${id}-said`}
        role="status"
        className={`mt-1 text-sm ${said?.isWrong === true ? 'font-medium text-anemone' : 'text-barnacle'}`}
      >
        {said?.words}
      </p>
    </div>
  );
}
