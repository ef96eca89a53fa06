const names = new Set(['localhost', '127.0.0.1', '::1', '[::1]'])

/** Whether a host name or address, without port, can only be reached from this computer. */
export const isLoopback = (host: string): boolean => names.has(host.toLowerCase()) || /^127(\.\d{1,3}){3}$/.test(host)
