import { Dialog } from '@/shared/client/components/dialog';
import { Facts } from '@/shared/client/components/table';

const KEYS = [
  { label: 'Search on this page', value: '/', isNumber: true },
  { label: 'Next or previous control', value: 'Tab, Shift Tab', isNumber: true },
  { label: 'Among candidate powers or choices', value: '↑ ↓', isNumber: true },
  { label: 'Open or choose', value: 'Enter, Space', isNumber: true },
  { label: 'Close a question', value: 'Esc', isNumber: true },
  { label: 'This list', value: '?', isNumber: true },
];

export function KeyList({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) {
  return (
    <Dialog title="Keys" isOpen={isOpen} onClose={onClose} cancelLabel="Close">
      <Facts items={KEYS} />
    </Dialog>
  );
}
