import { ActButton } from '@/app/_client/act-button';
import { api } from '@/lib/api/addresses';

interface OpenInvitationsProps {
  readonly invitations: readonly {
    readonly id: number;
    readonly email: string;
    readonly role: string;
    readonly by: string;
    readonly sent: string;
    readonly until: string;
  }[];
}

/** Who was invited and has not come yet. */
export function OpenInvitations({ invitations }: OpenInvitationsProps) {
  return (
    <div className="tbl-wrap">
      <table className="tbl">
        <caption className="sr-only">Open invitations</caption>
        <thead>
          <tr>
            <th scope="col">E-mail</th>
            <th scope="col">Role</th>
            <th scope="col">Invited</th>
            <th scope="col">Link works</th>
            <th scope="col">
              <span className="sr-only">Acts</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {invitations.map(({ id, email, role, by, sent, until }) => (
            <tr key={id}>
              <th scope="row">{email}</th>
              <td>{role}</td>
              <td>
                {sent} by {by}
              </td>
              <td>{until}</td>
              <td>
                <span className="flex flex-wrap gap-2">
                  <ActButton
                    quiet
                    label="Send again"
                    address={api.oneInvitation(id)}
                    method="POST"
                    done="Sent, with a new link."
                  />
                  <ActButton
                    quiet
                    label="Revoke"
                    address={api.oneInvitation(id)}
                    method="DELETE"
                    question={`Revoke the invitation of ${email}?`}
                  />
                </span>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
