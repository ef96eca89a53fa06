export interface Message {
  to: string
  subject: string
  text: string
}

/** Delivers one message: SMTP in production, a folder of .eml files by default. */
export interface Mail {
  send(message: Message): Promise<void>
  close(): Promise<void>
}
