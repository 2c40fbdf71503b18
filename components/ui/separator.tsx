import type { ComponentProps } from "react";
import { cn } from "./cn";

export function Separator({ className, ...props }: ComponentProps<"hr">) {
  return <hr className={cn("border-0 border-t border-hairline", className)} {...props} />;
}
