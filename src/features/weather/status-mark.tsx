export { SeverityMark, StatusMark } from '../../ui/status-mark.tsx';
