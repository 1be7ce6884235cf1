import type { Tab } from '@/components/ui/tabs'

export function labTabs(here: 'workload' | 'settings', mayManage: boolean): Tab[] {
  const tabs = [{ href: '/lab', label: 'Weeks ahead', isHere: here === 'workload' }]
  return mayManage
    ? [...tabs, { href: '/lab/settings', label: 'Settings', isHere: here === 'settings' }]
    : tabs
}
