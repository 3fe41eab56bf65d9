import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { Controller, useForm } from 'react-hook-form';
import { sessionStarted } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { TextField } from '@/shared/client/components/field';
import { readDraft, removeOldDrafts, writeDraft } from '@/shared/client/lib/drafts';
import { useFormDraft } from '@/shared/client/lib/use-form-draft';
import { aSession, OTHER_PERSON_ID } from '@/tests/support/sessions';

const ADA = aSession().user.id;
const DAY_MS = 24 * 60 * 60 * 1000;

function NameForm() {
  const form = useForm({ defaultValues: { familyName: '', givenName: '' } });
  const draft = useFormDraft(form, 'patient/new');
  return (
    <>
      {draft.isRestored ? <Button label="Start anew" onPress={draft.startAnew} /> : null}
      <Controller
        control={form.control}
        name="familyName"
        render={({ field }) => (
          <TextField label="Family name" value={field.value} onChange={field.onChange} isRequired />
        )}
      />
      <Button label="Save" onPress={draft.remove} />
    </>
  );
}

const familyName = () => screen.getByRole('textbox', { name: 'Family name' });

beforeEach(() => sessionStarted(aSession()));
afterEach(() => jest.useRealTimers());

describe('an open form', () => {
  it('comes back as it was typed', async () => {
    const user = userEvent.setup();
    const first = render(<NameForm />);
    await user.type(familyName(), 'Quill');
    first.unmount();

    render(<NameForm />);

    expect(familyName()).toHaveValue('Quill');
    expect(screen.getByRole('button', { name: 'Start anew' })).toBeInTheDocument();
  });

  it('is kept when the page goes away in the middle of a word', async () => {
    const user = userEvent.setup();
    render(<NameForm />);
    await user.type(familyName(), 'Qu');

    act(() => {
      globalThis.dispatchEvent(new Event('pagehide'));
    });

    expect(readDraft(ADA, 'patient/new')).toMatchObject({ familyName: 'Qu' });
  });

  it('leaves nothing behind once it is saved', async () => {
    const user = userEvent.setup();
    const first = render(<NameForm />);
    await user.type(familyName(), 'Quill');
    await user.click(screen.getByRole('button', { name: 'Save' }));
    first.unmount();

    expect(readDraft(ADA, 'patient/new')).toBeUndefined();
  });

  it('can be started anew', async () => {
    const user = userEvent.setup();
    writeDraft(ADA, 'patient/new', { familyName: 'Quill' });
    const first = render(<NameForm />);

    await user.click(screen.getByRole('button', { name: 'Start anew' }));

    expect(familyName()).toHaveValue('');
    first.unmount();
    expect(readDraft(ADA, 'patient/new')).toBeUndefined();
  });

  it('that nobody typed in is no draft', () => {
    render(<NameForm />).unmount();

    expect(localStorage).toHaveLength(0);
  });

  it('ignores what it no longer asks', () => {
    writeDraft(ADA, 'patient/new', { familyName: 'Quill', nickname: 'Q' });

    render(<NameForm />);

    expect(familyName()).toHaveValue('Quill');
  });
});

describe('drafts', () => {
  it('belong to one person', () => {
    writeDraft(ADA, 'patient/new', { familyName: 'Quill' });

    expect(readDraft(OTHER_PERSON_ID, 'patient/new')).toBeUndefined();
  });

  it('are kept a week and no longer', () => {
    jest.useFakeTimers({ now: 1_800_000_000_000 });
    writeDraft(ADA, 'patient/new', { familyName: 'Quill' });

    jest.setSystemTime(1_800_000_000_000 + 7 * DAY_MS - 1);
    expect(readDraft(ADA, 'patient/new')).toEqual({ familyName: 'Quill' });
    jest.setSystemTime(1_800_000_000_000 + 7 * DAY_MS);
    expect(readDraft(ADA, 'patient/new')).toBeUndefined();
  });

  it('that are old, broken or of an earlier shape are cleared away, whoever typed them', () => {
    jest.useFakeTimers({ now: 1_800_000_000_000 });
    writeDraft(OTHER_PERSON_ID, 'patient/new', { familyName: 'Old' });
    jest.setSystemTime(1_800_000_000_000 + 8 * DAY_MS);
    writeDraft(ADA, 'patient/new', { familyName: 'Quill' });
    localStorage.setItem(`landfall.draft.0.${ADA}.patient/new`, '{"savedAtMs":1800000000000,"values":{}}');
    localStorage.setItem(`landfall.draft.1.${ADA}.measurement`, 'broken');
    localStorage.setItem('landfall.theme', 'night');

    removeOldDrafts();

    expect(Object.keys(localStorage).sort()).toEqual([
      `landfall.draft.1.${ADA}.patient/new`,
      'landfall.theme',
    ]);
  });
});
