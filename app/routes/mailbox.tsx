export default function Mailbox() {
  return <h1>Mailbox</h1>
}
