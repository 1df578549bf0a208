import { type FormEvent, useState } from 'react';
import { type Role, roles } from '../../../shared/permissions.ts';
import { inviteBody } from '../../../shared/schemas/invitations.ts';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { checkForm, problemsOf, sentenceOf } from '../../lib/check-form.ts';
import { useInvite } from './invitations.queries.ts';

const roleOptions = roles.map((role) => ({ value: role, label: role }));

/** Invites an address; nobody is told whether it has an account. */
export function InviteForm({ library }: { library: string }) {
  const invite = useInvite(library);
  const [email, setEmail] = useState('');
  const [role, setRole] = useState<Role>('contributor');
  const [found, setFound] = useState<string | null>(null);
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(
      inviteBody,
      { email: email.trim(), role },
      { email: 'An address such as name@example.org is needed.' },
    );
    setFound(checked.problems?.email ?? null);
    if (checked.problems === null) invite.mutate(checked.data, { onSuccess: () => setEmail('') });
  }
  return (
    <form onSubmit={handleSubmit} noValidate className="border-t border-rule-strong pt-3">
      <div className="flex flex-wrap items-start gap-x-4 gap-y-3">
        <Field
          label="E-mail"
          type="email"
          autoComplete="off"
          value={email}
          problem={found ?? problemsOf(invite.error).email ?? null}
          onChange={(event) => setEmail(event.target.value)}
          className="w-[20em] max-w-full"
        />
        <SelectField label="Role" options={roleOptions} value={role} onChange={setRole} />
        <div className="pt-[22px] max-wide:pt-0">
          <Button type="submit" isMain disabled={invite.isPending}>
            Invite
          </Button>
        </div>
      </div>
      <div className="pt-2">
        <FormAlert>{sentenceOf(invite.error)}</FormAlert>
        <p role="status" className="text-note text-ink-3">
          {invite.isSuccess && `An invitation to ${invite.data.email} is on its way.`}
        </p>
      </div>
    </form>
  );
}
