import { clsx, type ClassValue } from "clsx";
import { twMerge } from "tailwind-merge";

/** Joins class names; of two that set the same property the later wins. */
export function cn(...inputs: ClassValue[]): string {
  return twMerge(clsx(inputs));
}
