import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { Button } from '@/shared/client/components/button';
import { Dialog } from '@/shared/client/components/dialog';
import { TextField } from '@/shared/client/components/field';

describe('a button', () => {
  it('acts on press, Enter and space', async () => {
    const user = userEvent.setup();
    const onPress = jest.fn();
    render(<Button label="Save" onPress={onPress} />);

    await user.click(screen.getByRole('button', { name: 'Save' }));
    await user.keyboard('{Enter}');
    await user.keyboard(' ');

    expect(onPress).toHaveBeenCalledTimes(3);
  });

  it('is disabled for the keyboard and for screen readers too', async () => {
    const user = userEvent.setup();
    const onPress = jest.fn();
    render(<Button label="Save" onPress={onPress} isDisabled />);
    const button = screen.getByRole('button', { name: 'Save' });

    fireEvent.click(button);
    await user.tab();

    expect(button).toBeDisabled();
    expect(button).not.toHaveFocus();
    expect(onPress).not.toHaveBeenCalled();
  });

  it('keeps the focus while it is busy and does not act twice', async () => {
    const user = userEvent.setup();
    const onPress = jest.fn();
    function Saving() {
      const [isBusy, setIsBusy] = useState(false);
      const press = () => {
        onPress();
        setIsBusy(true);
      };
      return <Button label="Save" isBusy={isBusy} onPress={press} />;
    }
    render(<Saving />);

    await user.tab();
    await user.keyboard('{Enter}');
    await user.keyboard('{Enter}');

    expect(onPress).toHaveBeenCalledTimes(1);
    expect(screen.getByRole('button', { name: 'Save' })).toHaveFocus();
    expect(screen.getByRole('button', { name: 'Save' })).toHaveAttribute('aria-busy', 'true');
  });
});

function Signing({ onSign = jest.fn() }: { onSign?: () => void }) {
  const [isOpen, setIsOpen] = useState(false);
  const [password, setPassword] = useState('');
  return (
    <>
      <Button label="Sign the plan" onPress={() => setIsOpen(true)} />
      <Dialog
        title="Sign for the right eye of Quill, Ada?"
        isOpen={isOpen}
        onClose={() => setIsOpen(false)}
        actions={<Button label="Sign" kind="danger" onPress={onSign} />}
      >
        <TextField label="Password" type="password" value={password} onChange={setPassword} isRequired />
      </Dialog>
    </>
  );
}

describe('a dialog', () => {
  async function opened() {
    const user = userEvent.setup();
    render(<Signing />);
    await user.click(screen.getByRole('button', { name: 'Sign the plan' }));
    return user;
  }

  it('is named by its question and begins at the least dangerous action', async () => {
    await opened();

    expect(screen.getByRole('dialog', { name: 'Sign for the right eye of Quill, Ada?' })).toHaveAttribute(
      'aria-modal',
      'true',
    );
    expect(screen.getByRole('button', { name: 'Cancel' })).toHaveFocus();
  });

  it('closes by Escape and gives the focus back to what opened it', async () => {
    const user = await opened();

    await user.keyboard('{Escape}');

    expect(screen.queryByRole('dialog')).not.toBeInTheDocument();
    expect(screen.getByRole('button', { name: 'Sign the plan' })).toHaveFocus();
  });

  it('keeps the focus inside', async () => {
    const user = await opened();
    const dialog = screen.getByRole('dialog');

    for (let step = 0; step < 8; step += 1) {
      await user.tab();
      expect(dialog.parentElement).toContainElement(document.activeElement as HTMLElement);
    }
  });

  it('does not confirm by Enter alone', async () => {
    const user = userEvent.setup();
    const onSign = jest.fn();
    render(<Signing onSign={onSign} />);

    await user.click(screen.getByRole('button', { name: 'Sign the plan' }));
    await user.keyboard('{Enter}');

    expect(onSign).not.toHaveBeenCalled();
    expect(screen.queryByRole('dialog')).not.toBeInTheDocument();
  });
});
