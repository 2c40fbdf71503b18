"use client";

import { useTransition } from "react";
import { notify } from "@/components/ui/notify";
import { Badge } from "@/components/ui/badge";
import { Select } from "@/components/ui/select";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { FormResult } from "@/lib/auth/form-answer";
import { roles, type Role } from "@/lib/auth/permissions";
import { formatDate } from "@/lib/shared/format-date";
import { ConfirmButton } from "./confirm-button";

type Member = { userId: string; name: string; email: string; role: Role; joinedAt: Date };
type Props = {
  members: readonly Member[];
  ownId: string;
  mayManage: boolean;
  changeRole: (userId: string, role: string) => Promise<FormResult<void>>;
  remove: (userId: string) => Promise<FormResult<void>>;
};

/** The members with their roles; owners change both here. */
export function MemberTable({ members, ownId, mayManage, changeRole, remove }: Props) {
  return (
    <Table label="Members">
      <TableHeader>
        <TableRow>
          <TableHead>Name</TableHead>
          <TableHead>E-mail</TableHead>
          <TableHead>Role</TableHead>
          <TableHead>Since</TableHead>
          {mayManage && (
            <TableHead>
              <span className="sr-only">Actions</span>
            </TableHead>
          )}
        </TableRow>
      </TableHeader>
      <TableBody>
        {members.map((member) => (
          <TableRow key={member.userId}>
            <TableCell>
              {member.name} {member.userId === ownId && <Badge>you</Badge>}
            </TableCell>
            <TableCell>{member.email}</TableCell>
            <TableCell>{mayManage ? <RoleSelect member={member} changeRole={changeRole} /> : member.role}</TableCell>
            <TableCell className="whitespace-nowrap">{formatDate(member.joinedAt)}</TableCell>
            {mayManage && (
              <TableCell className="text-right">
                {member.userId !== ownId && (
                  <ConfirmButton
                    label="Remove"
                    accessibleLabel={`Remove ${member.name}`}
                    title={`Remove ${member.name} from the team?`}
                    text="Their keys for this team end at once. What they recorded stays."
                    act={() => remove(member.userId)}
                    done={`${member.name} is out of the team.`}
                  />
                )}
              </TableCell>
            )}
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}

function RoleSelect({ member, changeRole }: { member: Member; changeRole: Props["changeRole"] }) {
  const [busy, start] = useTransition();
  function change(role: string): void {
    start(async () => {
      const result = await changeRole(member.userId, role);
      if (result.ok) notify(`${member.name} is ${role} now.`, "success");
      else notify(result.message, "error");
    });
  }
  return (
    <Select aria-label={`Role of ${member.name}`} value={member.role} disabled={busy} onChange={(event) => change(event.target.value)} className="h-9 min-w-32 text-sm">
      {roles.map((role) => (
        <option key={role}>{role}</option>
      ))}
    </Select>
  );
}
