"use server";

import { revalidatePath } from "next/cache";
import { headers } from "next/headers";
import type { FormResult } from "@/lib/auth/form-answer";
import { fieldsOf, formResult } from "@/lib/auth/form-result";
import { changeName, changePassword, endOtherSessions } from "@/lib/use-cases/account/change-account";

type Done = Promise<FormResult<undefined>>;

export async function changeNameAction(data: FormData): Done {
  const result = await formResult(async () => changeName({ headers: await headers() }, fieldsOf(data)));
  // The name stands in the band of every page.
  if (result.ok) revalidatePath("/", "layout");
  return result;
}

export async function changePasswordAction(data: FormData): Done {
  return formResult(async () => changePassword({ headers: await headers() }, fieldsOf(data)));
}

export async function endOtherSessionsAction(): Done {
  return formResult(async () => endOtherSessions({ headers: await headers() }, {}));
}
