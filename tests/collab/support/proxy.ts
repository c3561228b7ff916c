/** An address that stays while the process behind it changes: what a reverse proxy is to a browser. */
import { connect, createServer, type AddressInfo, type Socket } from 'node:net'

export interface Proxy {
  address: string
  /** Where new connections go; undefined: nowhere, as with a lost network. */
  lead(port: number | undefined): void
  /** Nothing passes any more, and nobody is told: a dead link that still looks alive. */
  stall(): void
  /** Breaks every connection. */
  cut(): void
  close(): Promise<void>
}

export const openProxy = async (port?: number): Promise<Proxy> => {
  let target = port
  const sockets = new Set<Socket>()
  const track = (socket: Socket) => {
    sockets.add(socket)
    socket.on('close', () => sockets.delete(socket))
    socket.on('error', () => socket.destroy())
  }
  const server = createServer((socket) => {
    track(socket)
    if (target === undefined) return void socket.destroy()
    const onward = connect(target, '127.0.0.1')
    track(onward)
    socket.pipe(onward).pipe(socket)
    socket.on('close', () => onward.destroy())
    onward.on('close', () => socket.destroy())
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const cut = () => {
    for (const socket of sockets) socket.destroy()
  }
  return {
    address: `ws://127.0.0.1:${(server.address() as AddressInfo).port}`,
    stall: () => {
      for (const socket of sockets) socket.pause()
    },
    lead: (next) => (target = next),
    cut,
    close: async () => {
      cut()
      await new Promise((resolve) => server.close(resolve))
    },
  }
}
