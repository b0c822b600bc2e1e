export default function Plate() {
  return null;
}
