"use client";

import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { FormResult } from "@/lib/auth/form-answer";
import type { Role } from "@/lib/auth/permissions";
import { formatDate } from "@/lib/shared/format-date";
import { ConfirmButton } from "./confirm-button";

type Invitation = { id: string | null; email: string; role: Role; inviterName: string; expiresAt: Date };

/** The invitations that can still be accepted. Those with an id can be revoked here. */
export function InvitationTable({ invitations, revoke }: { invitations: readonly Invitation[]; revoke: (id: string) => Promise<FormResult<void>> }) {
  if (invitations.length === 0) return <p className="text-sm text-faint">No invitation is open.</p>;
  return (
    <Table label="Open invitations">
      <TableHeader>
        <TableRow>
          <TableHead>E-mail</TableHead>
          <TableHead>Role</TableHead>
          <TableHead>Invited by</TableHead>
          <TableHead>Until</TableHead>
          <TableHead>
            <span className="sr-only">Actions</span>
          </TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        {invitations.map(({ id, ...invitation }) => (
          <TableRow key={invitation.email}>
            <TableCell>{invitation.email}</TableCell>
            <TableCell>{invitation.role}</TableCell>
            <TableCell>{invitation.inviterName}</TableCell>
            <TableCell className="whitespace-nowrap">{formatDate(invitation.expiresAt)}</TableCell>
            <TableCell className="text-right">
              {id !== null && (
                <ConfirmButton
                  label="Revoke"
                  accessibleLabel={`Revoke the invitation of ${invitation.email}`}
                  title={`Revoke the invitation of ${invitation.email}?`}
                  text="The link in the letter stops working."
                  act={() => revoke(id)}
                  done="The invitation is revoked."
                />
              )}
            </TableCell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
