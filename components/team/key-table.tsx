"use client";

import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { FormResult } from "@/lib/auth/form-answer";
import { formatDate, formatDateTime } from "@/lib/shared/format-date";
import { ConfirmButton } from "./confirm-button";

type Key = { id: string; name: string; start: string; scope: "read" | "write"; makerName: string; createdAt: Date; lastUsedAt: Date | null };
type Props = { keys: readonly Key[]; mayManage: boolean; revoke: (id: string) => Promise<FormResult<void>> };

/** The team's keys; of each only the beginning is known. */
export function KeyTable({ keys, mayManage, revoke }: Props) {
  if (keys.length === 0) return <p className="text-sm text-faint">The team has no keys. A key lets a batch job report its runs.</p>;
  return (
    <Table label="API keys">
      <TableHeader>
        <TableRow>
          <TableHead>Name</TableHead>
          <TableHead>Begins with</TableHead>
          <TableHead>May</TableHead>
          <TableHead>Made</TableHead>
          <TableHead>Last used</TableHead>
          {mayManage && (
            <TableHead>
              <span className="sr-only">Actions</span>
            </TableHead>
          )}
        </TableRow>
      </TableHeader>
      <TableBody>
        {keys.map((key) => (
          <TableRow key={key.id}>
            <TableCell>{key.name}</TableCell>
            <TableCell className="font-mono">{key.start}…</TableCell>
            <TableCell>{key.scope === "write" ? "read and write" : "read"}</TableCell>
            <TableCell className="whitespace-nowrap">
              {formatDate(key.createdAt)}, {key.makerName}
            </TableCell>
            <TableCell className="whitespace-nowrap">{key.lastUsedAt === null ? "never" : formatDateTime(key.lastUsedAt)}</TableCell>
            {mayManage && (
              <TableCell className="text-right">
                <ConfirmButton
                  label="Revoke"
                  accessibleLabel={`Revoke the key ${key.name}`}
                  title={`Revoke the key ${key.name}?`}
                  text="Scripts that use it are refused from now on."
                  act={() => revoke(key.id)}
                  done={`The key ${key.name} is revoked.`}
                />
              </TableCell>
            )}
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
