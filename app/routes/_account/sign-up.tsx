export default function Page() {
  return <h1>sign-up</h1>
}
