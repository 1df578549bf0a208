export interface FormAlertProps {
  /** A sentence; nothing is drawn where there is none. */
  children: string | null;
}

/** What is wrong with a form as a whole. The place is always there, so that it is read aloud when it is filled. */
export function FormAlert({ children }: FormAlertProps) {
  return (
    <div role="alert" className={children === null ? 'sr-only' : 'border-l-[3px] border-worse py-0.5 pl-3'}>
      {children}
    </div>
  );
}
