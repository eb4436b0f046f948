import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { KEYBOARD_WALK } from './keyboard-walk.ts';

export function KeyboardDialog({ onClose }: { readonly onClose: () => void }) {
  return (
    <Dialog isOpen onClose={onClose} title="The map by keyboard">
      <p className="mb-2 text-soft">
        Tab goes from one part to the next, Shift and Tab back. Escape closes what has opened. On the map a question
        mark opens this page.
      </p>
      <table className="w-full text-fine">
        <caption className="sr-only">Keys of each part, in the order of the Tab key</caption>
        <tbody>
          {KEYBOARD_WALK.map(({ part, keys }) => (
            <tr key={part} className="border-t border-line align-top">
              <th scope="row" className="py-1.5 pr-4 text-left font-semibold">
                {part}
              </th>
              <td className="py-1.5">{keys}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="mt-4 text-right">
        <Button onClick={onClose}>Close</Button>
      </p>
    </Dialog>
  );
}
