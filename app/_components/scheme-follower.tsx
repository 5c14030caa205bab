"use client";

import { useLayoutEffect } from "react";
import { applyScheme } from "./scheme";

/** Follows the device when it changes, and sets the scheme of pages that are made in the browser, where no script runs. */
export function SchemeFollower() {
  useLayoutEffect(() => {
    const device = matchMedia("(prefers-color-scheme: dark)");
    applyScheme();
    device.addEventListener("change", applyScheme);
    return () => device.removeEventListener("change", applyScheme);
  }, []);
  return null;
}
