'use client';

import { createContext, type ReactNode, useContext } from 'react';
import { type AxisTriple } from '@/lib/frames/axes';
import { type IssueChange } from '@/lib/frames/issue-change';

/** The frame issue in force, for a revision that is stated in another one, and how to get there. */
export interface FrameInForce {
  readonly number: number;
  readonly axes: AxisTriple;
  readonly change: IssueChange;
}

const Context = createContext<FrameInForce | null>(null);

export function FrameInForceProvider({
  frame,
  children,
}: {
  readonly frame: FrameInForce | null;
  readonly children: ReactNode;
}) {
  return <Context value={frame}>{children}</Context>;
}

/** Null where the revision on the page is stated in the issue in force. */
export function useFrameInForce(): FrameInForce | null {
  return useContext(Context);
}
