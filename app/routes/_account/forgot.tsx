export default function Page() {
  return <h1>forgot</h1>
}
