import { useState } from 'react';
import { roles } from '../../../shared/permissions.ts';
import type { MemberView } from '../../../shared/schemas/members.ts';
import { Ask } from '../../components/ui/ask.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatShortDate } from '../../lib/format.ts';
import { useRemoveMember, useSetRole } from './members.queries.ts';

export interface MemberTableProps {
  library: string;
  members: readonly MemberView[];
  canEdit: boolean;
  /** The one who looks: removes themselves by leaving, elsewhere. */
  ownId: string;
}

const roleOptions = roles.map((role) => ({ value: role, label: role }));

/** Who has which role; maintainers change it here. */
export function MemberTable({ library, members, canEdit, ownId }: MemberTableProps) {
  const setRole = useSetRole(library);
  const remove = useRemoveMember(library);
  const [asked, setAsked] = useState<string | null>(null);
  const going = members.find((member) => member.person === asked);
  return (
    <>
      <table className="table stack">
        <thead>
          <tr>
            <th scope="col">member</th>
            {canEdit && <th scope="col">e-mail</th>}
            <th scope="col">role</th>
            <th scope="col">since</th>
            {canEdit && (
              <th scope="col">
                <span className="sr-only">remove</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {members.map((member) => (
            <tr key={member.person}>
              <th scope="row">
                {member.name}
                {member.person === ownId && <span className="font-normal text-ink-3">, you</span>}
                {member.isDisabled && <span className="font-normal text-ink-3">, account disabled</span>}
              </th>
              {canEdit && <td className="wrap-anywhere text-ink-2">{member.email}</td>}
              <td>
                {canEdit ? (
                  <SelectField
                    label={`Role of ${member.name}`}
                    isLabelHidden
                    options={roleOptions}
                    value={member.role}
                    disabled={setRole.isPending}
                    onChange={(role) => setRole.mutate({ person: member.person, role })}
                  />
                ) : (
                  member.role
                )}
              </td>
              <td className="text-ink-2" data-label="since">
                {formatShortDate(member.since)}
              </td>
              {canEdit && (
                <td className="r max-wide:text-left">
                  {member.person !== ownId && (
                    <TextAction
                      aria-label={`Remove ${member.name} from the library`}
                      onClick={() => setAsked(member.person)}
                    >
                      Remove
                    </TextAction>
                  )}
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      <div className="pt-2">
        <FormAlert>{sentenceOf(setRole.error)}</FormAlert>
      </div>
      {going !== undefined && (
        <Ask
          question={
            <>
              Remove <b>{going.name}</b> from the library? What they did here stays, under their name.
            </>
          }
          word="Remove them"
          isBusy={remove.isPending}
          problem={sentenceOf(remove.error)}
          onYes={() => remove.mutate(going.person, { onSuccess: () => setAsked(null) })}
          onNo={() => {
            remove.reset();
            setAsked(null);
          }}
        />
      )}
    </>
  );
}
