import net from 'node:net'
import { expect, test } from 'vitest'
import { describeHolder, freePort, holdPort, readPort } from '#api/setup/ports.mjs'

test('PORT is 4600 when it is not given', () => {
  expect(readPort(undefined, 4600)).toBe(4600)
  expect(readPort('', 4600)).toBe(4600)
  expect(readPort('8080', 4600)).toBe(8080)
})

test.each(['abc', '0', '65536', '-1', '80.5', '0x50', ' 80'])('PORT=%s is refused with what it must be', (text) => {
  expect(() => readPort(text, 4600)).toThrow(`PORT is "${text}"; it must be a whole number from 1 to 65535.`)
})

test('a taken port is refused with who holds it and what to do', async () => {
  const port = await freePort()
  const held = await holdPort(port, '127.0.0.1')
  const refusal = await holdPort(port, '127.0.0.1').then(() => '', (error: Error) => error.message)
  await held.release()
  expect(refusal).toMatch(new RegExp(`^Port ${port} is taken by .*process ${process.pid}`))
  expect(refusal).toContain(`PORT=${port + 1} npm start`)
})

test('another checkout is named by its folder', async () => {
  const port = await freePort()
  const held = await holdPort(port, '127.0.0.1')
  const holder = describeHolder(port)
  await held.release()
  expect(holder).toBe(`the Hardpan checkout in ${process.cwd()} (process ${process.pid})`)
})

test('whoever asks while Hardpan starts is told to wait', async () => {
  const port = await freePort()
  const held = await holdPort(port, '127.0.0.1')
  const answer = await fetch(`http://127.0.0.1:${port}/`)
  expect([answer.status, await answer.text()]).toEqual([503, 'Hardpan is starting. This page reloads by itself.\n'])
  await held.release()
})

test('a released port is free for the server at once', async () => {
  const port = await freePort()
  await (await holdPort(port, '127.0.0.1')).release()
  const server = net.createServer().listen(port, '127.0.0.1')
  await new Promise((resolve) => server.once('listening', resolve))
  expect((server.address() as net.AddressInfo).port).toBe(port)
  server.close()
})

test('an address of another machine is refused by name', async () => {
  // 192.0.2.0/24 is set aside for documentation (RFC 5737): no machine has it.
  await expect(holdPort(await freePort(), '192.0.2.1')).rejects.toThrow('HOST is "192.0.2.1", which is not an address of this machine.')
})
