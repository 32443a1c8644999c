export default function Page() {
  return <h1>reset</h1>
}
